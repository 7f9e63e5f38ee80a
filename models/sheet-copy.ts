import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** A marked copy that was printed: its hash, not its bytes. Insert-only. */
export class SheetCopy extends Model<InferAttributes<SheetCopy>, InferCreationAttributes<SheetCopy>> {
  declare shopId: string;
  declare id: string;
  declare sheetId: string;
  declare sha256: string;
  declare marked: string;
  declare at: Date;
  declare by: string;

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
      },
      modelOptions(sequelize, "SheetCopy", "sheet_copies"),
    );
  }
}
