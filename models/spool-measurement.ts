import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { FittedVerdict } from "@/iso";
import { idColumn, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** One measurement of a finished spool against a revision. Insert-only: a new one is a new row. */
export class SpoolMeasurement extends Model<InferAttributes<SpoolMeasurement>, InferCreationAttributes<SpoolMeasurement>> {
  declare shopId: string;
  declare id: string;
  declare spoolId: string;
  declare revisionId: string;
  declare document: string;
  declare verdict: FittedVerdict;
  declare headline: string;
  declare by: string;
  declare at: Date;

  static bindTo(sequelize: Sequelize): void {
    SpoolMeasurement.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        spoolId: uuidColumn(),
        revisionId: uuidColumn(),
        document: textColumn(),
        verdict: textColumn(),
        headline: textColumn(),
        by: uuidColumn(),
        at: timeColumn(),
      },
      modelOptions(sequelize, "SpoolMeasurement", "spool_measurements"),
    );
  }
}
