import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, textColumn, timeColumn, timeOrNull, uuidColumn } from "./columns";

/** One signed-in device. The cookie carries its id only; what it may do is read on each request. */
export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
  declare id: string;
  declare personId: string;
  declare shopId: string;
  declare device: string;
  declare createdAt: Date;
  declare lastSeenAt: Date;
  declare expiresAt: Date;
  declare endedAt: CreationOptional<Date | null>;

  static bindTo(sequelize: Sequelize): void {
    Session.init(
      {
        id: idColumn(),
        personId: uuidColumn(),
        shopId: uuidColumn(),
        device: textColumn(),
        createdAt: timeColumn(),
        lastSeenAt: timeColumn(),
        expiresAt: timeColumn(),
        endedAt: timeOrNull(),
      },
      modelOptions(sequelize, "Session", "sessions"),
    );
  }
}
