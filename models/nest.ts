import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { NestState } from "@/lib/rules/nest-plans";
import { idColumn, modelOptions, textColumn, textOrNull, timeColumn, timeOrNull, uuidColumn, uuidOrNull } from "./columns";

/** A cutting plan: what it was made from, and what was found. What it was made from never changes. */
export class Nest extends Model<InferAttributes<Nest>, InferCreationAttributes<Nest>> {
  declare shopId: string;
  declare id: string;
  declare jobId: string;
  declare title: string;
  declare state: NestState;
  declare source: string;
  declare sourceSha256: string;
  declare progress: CreationOptional<string>;
  declare result: CreationOptional<string | null>;
  declare askedBy: string;
  declare askedAt: Date;
  declare doneAt: CreationOptional<Date | null>;
  declare cutBy: CreationOptional<string | null>;
  declare cutAt: CreationOptional<Date | null>;

  static bindTo(sequelize: Sequelize): void {
    Nest.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        jobId: uuidColumn(),
        title: textColumn(),
        state: textColumn(),
        source: textColumn(),
        sourceSha256: textColumn(),
        progress: { ...textColumn(), defaultValue: "" },
        result: textOrNull(),
        askedBy: uuidColumn(),
        askedAt: timeColumn(),
        doneAt: timeOrNull(),
        cutBy: uuidOrNull(),
        cutAt: timeOrNull(),
      },
      modelOptions(sequelize, "Nest", "nests"),
    );
  }
}
