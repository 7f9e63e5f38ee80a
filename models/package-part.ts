import { Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, integerColumn, modelOptions, textColumn, timeOrNull, uuidColumn } from "./columns";

/** Some sheets of a package, prepared and stored until the result is. Written before its object, removed after it. */
export class PackagePart extends Model<InferAttributes<PackagePart>, InferCreationAttributes<PackagePart>> {
  declare shopId: string;
  declare id: string;
  declare packageId: string;
  declare ordinal: number;
  declare sheets: number;
  declare pages: number;
  declare objectKey: string;
  declare storedAt: CreationOptional<Date | null>;

  static bindTo(sequelize: Sequelize): void {
    PackagePart.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        packageId: uuidColumn(),
        ordinal: integerColumn(),
        sheets: integerColumn(),
        pages: integerColumn(),
        objectKey: textColumn(),
        storedAt: timeOrNull(),
      },
      modelOptions(sequelize, "PackagePart", "package_parts"),
    );
  }
}
