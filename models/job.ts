import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { StoredJobSettings } from "@/lib/rules/default-settings";
import { booleanColumn, idColumn, jsonColumn, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** A job and what it hands down to new lines. */
export class Job extends Model<InferAttributes<Job>, InferCreationAttributes<Job>> {
  declare shopId: string;
  declare id: string;
  declare number: string;
  declare title: string;
  declare client: string;
  declare area: string;
  declare open: boolean;
  declare settings: StoredJobSettings;
  declare createdAt: Date;
  declare createdBy: string;
  declare updatedAt: Date;

  static bindTo(sequelize: Sequelize): void {
    Job.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        number: textColumn(),
        title: textColumn(),
        client: textColumn(),
        area: textColumn(),
        open: booleanColumn(),
        settings: jsonColumn(),
        createdAt: timeColumn(),
        createdBy: uuidColumn(),
        updatedAt: timeColumn(),
      },
      modelOptions(sequelize, "Job", "jobs"),
    );
  }
}
