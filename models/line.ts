import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, integerColumn, modelOptions, textColumn, timeColumn, timeOrNull, uuidColumn } from "./columns";

/** A line: its run document and marks register as stored text. */
export class Line extends Model<InferAttributes<Line>, InferCreationAttributes<Line>> {
  declare shopId: string;
  declare id: string;
  declare jobId: string;
  declare number: string;
  declare title: string;
  declare size: string;
  declare material: string;
  declare points: number;
  declare document: string;
  declare marks: string;
  declare version: number;
  declare createdAt: Date;
  declare createdBy: string;
  declare updatedAt: Date;
  declare updatedBy: string;
  declare archivedAt: CreationOptional<Date | null>;

  static bindTo(sequelize: Sequelize): void {
    Line.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        jobId: uuidColumn(),
        number: textColumn(),
        title: textColumn(),
        size: textColumn(),
        material: textColumn(),
        points: integerColumn(),
        document: textColumn(),
        marks: textColumn(),
        version: integerColumn(),
        createdAt: timeColumn(),
        createdBy: uuidColumn(),
        updatedAt: timeColumn(),
        updatedBy: uuidColumn(),
        archivedAt: timeOrNull(),
      },
      modelOptions(sequelize, "Line", "lines"),
    );
  }
}
