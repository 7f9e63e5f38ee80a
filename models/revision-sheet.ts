import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { countColumn, idColumn, integerColumn, modelOptions, textColumn, timeColumn, uuidColumn, uuidOrNull } from "./columns";

/** A stored PDF of a revision. Insert-only. */
export class RevisionSheet extends Model<InferAttributes<RevisionSheet>, InferCreationAttributes<RevisionSheet>> {
  declare shopId: string;
  declare id: string;
  declare revisionId: string;
  declare kind: "review" | "fabrication";
  declare sha256: string;
  declare bytes: number;
  declare objectKey: string;
  declare auditSeq: number;
  declare auditHash: string;
  declare at: Date;
  /** The certificate that signed it; null for one not signed. */
  declare certificateId: string | null;

  static bindTo(sequelize: Sequelize): void {
    RevisionSheet.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        revisionId: uuidColumn(),
        kind: textColumn(),
        sha256: textColumn(),
        bytes: integerColumn(),
        objectKey: textColumn(),
        auditSeq: countColumn("auditSeq"),
        auditHash: textColumn(),
        at: timeColumn(),
        certificateId: uuidOrNull(),
      },
      modelOptions(sequelize, "RevisionSheet", "revision_sheets"),
    );
  }
}
