import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { PackageState } from "@/lib/rules/packages";
import { countOrNull, idColumn, integerColumn, integerOrNull, modelOptions, textColumn, textOrNull, timeColumn, timeOrNull, uuidColumn } from "./columns";

/** Sheets of a job in one file: what was asked for, who makes it, and the one result. */
export class Package extends Model<InferAttributes<Package>, InferCreationAttributes<Package>> {
  declare shopId: string;
  declare id: string;
  declare jobId: string;
  declare title: string;
  declare state: PackageState;
  declare source: string;
  declare sourceSha256: string;
  declare transmittal: string | null;
  declare worker: CreationOptional<string | null>;
  declare workerUntil: CreationOptional<Date | null>;
  declare takes: CreationOptional<number>;
  declare objectKey: CreationOptional<string | null>;
  declare sha256: CreationOptional<string | null>;
  declare bytes: CreationOptional<number | null>;
  declare pages: CreationOptional<number | null>;
  declare problem: CreationOptional<string | null>;
  declare askedBy: string;
  declare askedAt: Date;
  declare doneAt: CreationOptional<Date | null>;

  static bindTo(sequelize: Sequelize): void {
    Package.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        jobId: uuidColumn(),
        title: textColumn(),
        state: textColumn(),
        source: textColumn(),
        sourceSha256: textColumn(),
        transmittal: textOrNull(),
        worker: textOrNull(),
        workerUntil: timeOrNull(),
        takes: { ...integerColumn(), defaultValue: 0 },
        objectKey: textOrNull(),
        sha256: textOrNull(),
        bytes: countOrNull("bytes"),
        pages: integerOrNull(),
        problem: textOrNull(),
        askedBy: uuidColumn(),
        askedAt: timeColumn(),
        doneAt: timeOrNull(),
      },
      modelOptions(sequelize, "Package", "packages"),
    );
  }
}
