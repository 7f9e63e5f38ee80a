import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, textColumn, timeColumn, timeOrNull, uuidColumn } from "./columns";

/** A mailed link to set a new password, used once. Only the token's hash is kept. */
export class PasswordReset extends Model<InferAttributes<PasswordReset>, InferCreationAttributes<PasswordReset>> {
  declare id: string;
  declare personId: string;
  declare tokenHash: string;
  declare createdAt: Date;
  declare expiresAt: Date;
  declare usedAt: CreationOptional<Date | null>;

  static bindTo(sequelize: Sequelize): void {
    PasswordReset.init(
      {
        id: idColumn(),
        personId: uuidColumn(),
        tokenHash: textColumn(),
        createdAt: timeColumn(),
        expiresAt: timeColumn(),
        usedAt: timeOrNull(),
      },
      modelOptions(sequelize, "PasswordReset", "password_resets"),
    );
  }
}
