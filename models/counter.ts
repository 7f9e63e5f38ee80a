import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { countColumn, modelOptions, textColumn, uuidColumn } from "./columns";

/** Numbers handed out once each, without gaps. */
export class Counter extends Model<InferAttributes<Counter>, InferCreationAttributes<Counter>> {
  declare shopId: string;
  declare name: string;
  declare value: number;

  static bindTo(sequelize: Sequelize): void {
    Counter.init(
      {
        shopId: { ...uuidColumn(), primaryKey: true },
        name: { ...textColumn(), primaryKey: true },
        value: countColumn("value"),
      },
      modelOptions(sequelize, "Counter", "counters"),
    );
  }
}
