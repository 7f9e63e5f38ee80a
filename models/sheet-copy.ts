import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, textColumn, timeColumn, uuidColumn, uuidOrNull } from "./columns";

/** A marked copy that was printed: its hash, not its bytes. Insert-only. */
export class SheetCopy extends Model<InferAttributes<SheetCopy>, InferCreationAttributes<SheetCopy>> {
  declare shopId: string;
  declare id: string;
  declare sheetId: string;
  declare sha256: string;
  declare marked: string;
  declare at: Date;
  declare by: string;
  /** The package it was taken with; null for one taken by itself. */
  declare packageId: CreationOptional<string | null>;

  static bindTo(sequelize: Sequelize): void {
    SheetCopy.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        sheetId: uuidColumn(),
        sha256: textColumn(),
        marked: textColumn(),
        at: timeColumn(),
        by: uuidColumn(),
        packageId: uuidOrNull(),
      },
      modelOptions(sequelize, "SheetCopy", "sheet_copies"),
    );
  }
}
