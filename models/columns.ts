/**
 * Column shapes the models share. Keys, checks and foreign keys are stated in the migrations; here is what code reads.
 * Functions, since Sequelize writes the column's name into the object it is given.
 */
import { DataTypes, type InitOptions, type Model, type Sequelize } from "sequelize";

export const uuidColumn = () => ({ type: DataTypes.UUID, allowNull: false });
export const uuidOrNull = () => ({ type: DataTypes.UUID, allowNull: true });
export const idColumn = () => ({ type: DataTypes.UUID, allowNull: false, primaryKey: true });
export const textColumn = () => ({ type: DataTypes.TEXT, allowNull: false });
export const textOrNull = () => ({ type: DataTypes.TEXT, allowNull: true });
export const timeColumn = () => ({ type: DataTypes.DATE(3), allowNull: false });
export const timeOrNull = () => ({ type: DataTypes.DATE(3), allowNull: true });
export const integerColumn = () => ({ type: DataTypes.INTEGER, allowNull: false });
export const integerOrNull = () => ({ type: DataTypes.INTEGER, allowNull: true });
export const booleanColumn = () => ({ type: DataTypes.BOOLEAN, allowNull: false });
export const jsonColumn = () => ({ type: DataTypes.JSONB, allowNull: false });
export const numberOrNull = () => ({ type: DataTypes.DOUBLE, allowNull: true });
/** A 64-bit count read as a number: counts of ours stay far below 2^53. */
export function countColumn(name: string) {
  return {
    type: DataTypes.BIGINT,
    allowNull: false,
    get(this: Model): number {
      return Number(this.getDataValue(name as never));
    },
  };
}

/** As countColumn, where there may be none. */
export function countOrNull(name: string) {
  return {
    type: DataTypes.BIGINT,
    allowNull: true,
    get(this: Model): number | null {
      const value: unknown = this.getDataValue(name as never);
      return value === null || value === undefined ? null : Number(value);
    },
  };
}

/** The model's name is given, since minified class names rename models; no timestamps are kept behind our back. */
export function modelOptions<M extends Model>(sequelize: Sequelize, modelName: string, tableName: string): InitOptions<M> {
  return { sequelize, modelName, tableName, timestamps: false, underscored: true };
}
