import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { integerColumn, modelOptions, textColumn, timeColumn } from "./columns";

/** Tries counted per account and per address. */
export class Throttle extends Model<InferAttributes<Throttle>, InferCreationAttributes<Throttle>> {
  declare key: string;
  declare tries: number;
  declare windowStartedAt: Date;

  static bindTo(sequelize: Sequelize): void {
    Throttle.init(
      {
        key: { ...textColumn(), primaryKey: true },
        tries: integerColumn(),
        windowStartedAt: timeColumn(),
      },
      modelOptions(sequelize, "Throttle", "throttles"),
    );
  }
}
