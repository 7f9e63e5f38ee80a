import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, integerColumn, modelOptions, textColumn, timeColumn, timeOrNull, uuidColumn, uuidOrNull } from "./columns";

/** A sketch, a photo or a logo in the object store. */
export class Upload extends Model<InferAttributes<Upload>, InferCreationAttributes<Upload>> {
  declare shopId: string;
  declare id: string;
  declare lineId: CreationOptional<string | null>;
  declare kind: "sketch" | "logo";
  declare name: string;
  declare type: string;
  declare bytes: number;
  declare sha256: string;
  declare objectKey: string;
  declare at: Date;
  declare by: string;
  declare removedAt: CreationOptional<Date | null>;

  static bindTo(sequelize: Sequelize): void {
    Upload.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        lineId: uuidOrNull(),
        kind: textColumn(),
        name: textColumn(),
        type: textColumn(),
        bytes: integerColumn(),
        sha256: textColumn(),
        objectKey: textColumn(),
        at: timeColumn(),
        by: uuidColumn(),
        removedAt: timeOrNull(),
      },
      modelOptions(sequelize, "Upload", "uploads"),
    );
  }
}
