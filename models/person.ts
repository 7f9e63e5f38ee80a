import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, modelOptions, textColumn, timeColumn } from "./columns";

/** A human being, in as many shops as have them. */
export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
  declare id: string;
  declare email: string;
  declare name: string;
  declare passwordHash: string;
  declare createdAt: Date;

  static bindTo(sequelize: Sequelize): void {
    Person.init(
      {
        id: idColumn(),
        email: textColumn(),
        name: textColumn(),
        passwordHash: textColumn(),
        createdAt: timeColumn(),
      },
      modelOptions(sequelize, "Person", "people"),
    );
  }
}
