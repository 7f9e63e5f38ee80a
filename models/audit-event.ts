import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { countColumn, modelOptions, textColumn, timeColumn, uuidColumn, uuidOrNull } from "./columns";

/** One entry of a shop's log. Insert-only. */
export class AuditEvent extends Model<InferAttributes<AuditEvent>, InferCreationAttributes<AuditEvent>> {
  declare shopId: string;
  declare seq: number;
  declare type: string;
  declare data: string;
  declare actor: CreationOptional<string | null>;
  declare at: Date;
  declare prevHash: string;
  declare hash: string;

  static bindTo(sequelize: Sequelize): void {
    AuditEvent.init(
      {
        shopId: { ...uuidColumn(), primaryKey: true },
        seq: { ...countColumn("seq"), primaryKey: true },
        type: textColumn(),
        data: textColumn(),
        actor: uuidOrNull(),
        at: timeColumn(),
        prevHash: textColumn(),
        hash: textColumn(),
      },
      modelOptions(sequelize, "AuditEvent", "audit_events"),
    );
  }
}
