import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** What a sheet was made from, frozen as text. Insert-only. */
export class RevisionInput extends Model<InferAttributes<RevisionInput>, InferCreationAttributes<RevisionInput>> {
  declare shopId: string;
  declare id: string;
  declare revisionId: string;
  declare kind: "review" | "fabrication";
  declare input: string;
  declare sha256: string;
  declare contentKey: string;
  declare at: Date;

  static bindTo(sequelize: Sequelize): void {
    RevisionInput.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        revisionId: uuidColumn(),
        kind: textColumn(),
        input: textColumn(),
        sha256: textColumn(),
        contentKey: textColumn(),
        at: timeColumn(),
      },
      modelOptions(sequelize, "RevisionInput", "revision_inputs"),
    );
  }
}
