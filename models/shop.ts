import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import type { StoredShopSettings } from "@/lib/rules/default-settings";
import { idColumn, jsonColumn, modelOptions, textColumn, timeColumn } from "./columns";

/** A shop: everything but people belongs to one. */
export class Shop extends Model<InferAttributes<Shop>, InferCreationAttributes<Shop>> {
  declare id: string;
  declare name: string;
  declare settings: StoredShopSettings;
  declare createdAt: Date;

  static bindTo(sequelize: Sequelize): void {
    Shop.init(
      {
        id: idColumn(),
        name: textColumn(),
        settings: jsonColumn(),
        createdAt: timeColumn(),
      },
      modelOptions(sequelize, "Shop", "shops"),
    );
  }
}
