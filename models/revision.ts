import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { RevisionState } from "@/iso";
import { booleanColumn, idColumn, integerColumn, modelOptions, textColumn, textOrNull, timeColumn, timeOrNull, uuidColumn, uuidOrNull } from "./columns";

/** A revision of a spool. What it was submitted as never changes; a trigger guards its state. */
export class Revision extends Model<InferAttributes<Revision>, InferCreationAttributes<Revision>> {
  declare shopId: string;
  declare id: string;
  declare spoolId: string;
  declare code: string;
  declare ordinal: number;
  declare state: RevisionState;
  declare hold: boolean;
  declare holdReason: CreationOptional<string | null>;
  declare description: string;
  declare lineVersion: number;
  declare contentSha256: string;
  declare statusToken: string;
  declare submittedBy: string;
  declare submittedAt: Date;
  declare signedBy: CreationOptional<string | null>;
  declare signedAt: CreationOptional<Date | null>;
  declare returnReason: CreationOptional<string | null>;
  declare voidReason: CreationOptional<string | null>;
  declare stateAt: Date;
  declare stateBy: string;

  static bindTo(sequelize: Sequelize): void {
    Revision.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        spoolId: uuidColumn(),
        code: textColumn(),
        ordinal: integerColumn(),
        state: textColumn(),
        hold: booleanColumn(),
        holdReason: textOrNull(),
        description: textColumn(),
        lineVersion: integerColumn(),
        contentSha256: textColumn(),
        statusToken: textColumn(),
        submittedBy: uuidColumn(),
        submittedAt: timeColumn(),
        signedBy: uuidOrNull(),
        signedAt: timeOrNull(),
        returnReason: textOrNull(),
        voidReason: textOrNull(),
        stateAt: timeColumn(),
        stateBy: uuidColumn(),
      },
      modelOptions(sequelize, "Revision", "revisions"),
    );
  }
}
