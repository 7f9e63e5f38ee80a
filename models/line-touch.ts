import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, integerColumn, modelOptions, timeColumn, uuidColumn } from "./columns";

/** Who touched a line's content, and when. Insert-only. */
export class LineTouch extends Model<InferAttributes<LineTouch>, InferCreationAttributes<LineTouch>> {
  declare shopId: string;
  declare id: string;
  declare lineId: string;
  declare personId: string;
  declare version: number;
  declare at: Date;

  static bindTo(sequelize: Sequelize): void {
    LineTouch.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        lineId: uuidColumn(),
        personId: uuidColumn(),
        version: integerColumn(),
        at: timeColumn(),
      },
      modelOptions(sequelize, "LineTouch", "line_touches"),
    );
  }
}
