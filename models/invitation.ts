import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { Role } from "@/lib/rules/api-types";
import { idColumn, modelOptions, textColumn, timeColumn, timeOrNull, uuidColumn } from "./columns";

/** A mailed link into a shop, used once. Only the token's hash is kept. */
export class Invitation extends Model<InferAttributes<Invitation>, InferCreationAttributes<Invitation>> {
  declare shopId: string;
  declare id: string;
  declare email: string;
  declare role: Role;
  declare tokenHash: string;
  declare invitedBy: string;
  declare createdAt: Date;
  declare expiresAt: Date;
  declare acceptedAt: CreationOptional<Date | null>;
  declare withdrawnAt: CreationOptional<Date | null>;

  static bindTo(sequelize: Sequelize): void {
    Invitation.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        email: textColumn(),
        role: textColumn(),
        tokenHash: textColumn(),
        invitedBy: uuidColumn(),
        createdAt: timeColumn(),
        expiresAt: timeColumn(),
        acceptedAt: timeOrNull(),
        withdrawnAt: timeOrNull(),
      },
      modelOptions(sequelize, "Invitation", "invitations"),
    );
  }
}
