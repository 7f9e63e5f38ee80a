import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, textColumn, timeColumn, timeOrNull, uuidColumn, uuidOrNull } from "./columns";

/** A rest of a length on the rack. It is never changed but for leaving the rack. */
export class Offcut extends Model<InferAttributes<Offcut>, InferCreationAttributes<Offcut>> {
  declare shopId: string;
  declare id: string;
  declare nps: string;
  declare schedule: string;
  declare material: string;
  declare lengthMm: number;
  /** "" = not known. */
  declare heat: string;
  declare cameFrom: CreationOptional<string | null>;
  declare addedBy: string;
  declare addedAt: Date;
  declare goneAt: CreationOptional<Date | null>;
  declare goneBy: CreationOptional<string | null>;
  declare goneTo: CreationOptional<string | null>;
  declare goneWhy: CreationOptional<string>;

  static bindTo(sequelize: Sequelize): void {
    Offcut.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        nps: textColumn(),
        schedule: textColumn(),
        material: textColumn(),
        lengthMm: { type: DataTypes.DOUBLE, allowNull: false },
        heat: textColumn(),
        cameFrom: uuidOrNull(),
        addedBy: uuidColumn(),
        addedAt: timeColumn(),
        goneAt: timeOrNull(),
        goneBy: uuidOrNull(),
        goneTo: uuidOrNull(),
        goneWhy: { ...textColumn(), defaultValue: "" },
      },
      modelOptions(sequelize, "Offcut", "offcuts"),
    );
  }
}
