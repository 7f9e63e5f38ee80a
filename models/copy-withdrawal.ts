import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, timeColumn, uuidColumn } from "./columns";

/** Somebody took a copy out of use. Insert-only, one a copy. */
export class CopyWithdrawal extends Model<InferAttributes<CopyWithdrawal>, InferCreationAttributes<CopyWithdrawal>> {
  declare shopId: string;
  declare id: string;
  declare copyId: string;
  declare at: Date;
  declare by: string;

  static bindTo(sequelize: Sequelize): void {
    CopyWithdrawal.init(
      { shopId: uuidColumn(), id: idColumn(), copyId: uuidColumn(), at: timeColumn(), by: uuidColumn() },
      modelOptions(sequelize, "CopyWithdrawal", "copy_withdrawals"),
    );
  }
}
