import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** A signature or a return. Insert-only. */
export class SignOff extends Model<InferAttributes<SignOff>, InferCreationAttributes<SignOff>> {
  declare shopId: string;
  declare id: string;
  declare revisionId: string;
  declare personId: string;
  declare decision: "signed" | "returned";
  declare reason: string;
  declare accepted: string;
  declare inputSha256: string;
  declare at: Date;

  static bindTo(sequelize: Sequelize): void {
    SignOff.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        revisionId: uuidColumn(),
        personId: uuidColumn(),
        decision: textColumn(),
        reason: textColumn(),
        accepted: textColumn(),
        inputSha256: textColumn(),
        at: timeColumn(),
      },
      modelOptions(sequelize, "SignOff", "sign_offs"),
    );
  }
}
