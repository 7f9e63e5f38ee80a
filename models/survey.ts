import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, integerColumn, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** What was measured for a line: its survey document as stored text, with a version to tell two savers apart. */
export class Survey extends Model<InferAttributes<Survey>, InferCreationAttributes<Survey>> {
  declare shopId: string;
  declare id: string;
  declare lineId: string;
  declare document: string;
  declare version: number;
  declare updatedAt: Date;
  declare updatedBy: string;

  static bindTo(sequelize: Sequelize): void {
    Survey.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        lineId: uuidColumn(),
        document: textColumn(),
        version: integerColumn(),
        updatedAt: timeColumn(),
        updatedBy: uuidColumn(),
      },
      modelOptions(sequelize, "Survey", "surveys"),
    );
  }
}
