import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { Role } from "@/lib/rules/api-types";
import { idColumn, modelOptions, textColumn, timeColumn, timeOrNull, uuidColumn } from "./columns";

/** Who belongs to a shop, and as what; removed rows stay as history. */
export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  declare shopId: string;
  declare id: string;
  declare personId: string;
  declare role: Role;
  declare joinedAt: Date;
  declare removedAt: CreationOptional<Date | null>;

  static bindTo(sequelize: Sequelize): void {
    Membership.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        personId: uuidColumn(),
        role: textColumn(),
        joinedAt: timeColumn(),
        removedAt: timeOrNull(),
      },
      modelOptions(sequelize, "Membership", "memberships"),
    );
  }
}
