import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { RevisionState } from "@/iso";
import { booleanColumn, idColumn, integerColumn, modelOptions, textColumn, uuidColumn } from "./columns";

/** A stored sheet in a package, with the state it had when the package was asked for. Insert-only. */
export class PackageSheet extends Model<InferAttributes<PackageSheet>, InferCreationAttributes<PackageSheet>> {
  declare shopId: string;
  declare id: string;
  declare packageId: string;
  declare ordinal: number;
  declare sheetId: string;
  declare state: RevisionState;
  declare hold: boolean;

  static bindTo(sequelize: Sequelize): void {
    PackageSheet.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        packageId: uuidColumn(),
        ordinal: integerColumn(),
        sheetId: uuidColumn(),
        state: textColumn(),
        hold: booleanColumn(),
      },
      modelOptions(sequelize, "PackageSheet", "package_sheets"),
    );
  }
}
