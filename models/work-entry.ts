import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { WorkKind } from "@/lib/rules/api-types";
import { idColumn, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** What the bench recorded against a revision. Insert-only. */
export class WorkEntry extends Model<InferAttributes<WorkEntry>, InferCreationAttributes<WorkEntry>> {
  declare shopId: string;
  declare id: string;
  declare spoolId: string;
  declare revisionId: string;
  declare kind: WorkKind;
  declare mark: string;
  declare key: string;
  declare entryValues: string;
  declare by: string;
  declare at: Date;

  static bindTo(sequelize: Sequelize): void {
    WorkEntry.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        spoolId: uuidColumn(),
        revisionId: uuidColumn(),
        kind: textColumn(),
        mark: textColumn(),
        key: textColumn(),
        entryValues: textColumn(),
        by: uuidColumn(),
        at: timeColumn(),
      },
      modelOptions(sequelize, "WorkEntry", "work_entries"),
    );
  }
}
