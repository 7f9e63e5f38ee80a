import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { countColumn, idColumn, modelOptions, numberOrNull, textColumn, timeColumn, uuidColumn } from "./columns";

/** The shop's word on a catalogue take-out; the newest of a key counts. Insert-only. */
export class TakeOutWord extends Model<InferAttributes<TakeOutWord>, InferCreationAttributes<TakeOutWord>> {
  declare shopId: string;
  declare id: string;
  declare key: string;
  declare valueMm: CreationOptional<number | null>;
  declare by: string;
  declare at: Date;
  declare seq: CreationOptional<number>;

  static bindTo(sequelize: Sequelize): void {
    TakeOutWord.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        key: textColumn(),
        valueMm: numberOrNull(),
        by: uuidColumn(),
        at: timeColumn(),
        seq: { ...countColumn("seq"), allowNull: true },
      },
      modelOptions(sequelize, "TakeOutWord", "take_out_words"),
    );
  }
}
