import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, integerOrNull, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** What stays connected when a line's field joints open. Its sheet number is given once. */
export class Spool extends Model<InferAttributes<Spool>, InferCreationAttributes<Spool>> {
  declare shopId: string;
  declare id: string;
  declare lineId: string;
  declare letter: string;
  declare sheetNumber: CreationOptional<number | null>;
  declare status: "live" | "void";
  declare createdAt: Date;

  static bindTo(sequelize: Sequelize): void {
    Spool.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        lineId: uuidColumn(),
        letter: textColumn(),
        sheetNumber: integerOrNull(),
        status: textColumn(),
        createdAt: timeColumn(),
      },
      modelOptions(sequelize, "Spool", "spools"),
    );
  }
}
