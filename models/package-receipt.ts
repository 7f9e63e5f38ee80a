import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** What the recipient of a transmittal answered, as somebody of the shop noted it. Insert-only. */
export class PackageReceipt extends Model<InferAttributes<PackageReceipt>, InferCreationAttributes<PackageReceipt>> {
  declare shopId: string;
  declare id: string;
  declare packageId: string;
  declare receivedBy: string;
  /** YYYY-MM-DD. */
  declare receivedOn: string;
  declare remark: string;
  declare by: string;
  declare at: Date;

  static bindTo(sequelize: Sequelize): void {
    PackageReceipt.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        packageId: uuidColumn(),
        receivedBy: textColumn(),
        receivedOn: { type: DataTypes.DATEONLY, allowNull: false },
        remark: textColumn(),
        by: uuidColumn(),
        at: timeColumn(),
      },
      modelOptions(sequelize, "PackageReceipt", "package_receipts"),
    );
  }
}
