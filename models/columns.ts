/** Column shapes the models share. Keys, checks and foreign keys are stated in the migrations; here is what code reads. */
import { DataTypes, type InitOptions, type Model, type Sequelize } from "sequelize";

export const uuidColumn = { type: DataTypes.UUID, allowNull: false } as const;
export const uuidOrNull = { type: DataTypes.UUID, allowNull: true } as const;
export const idColumn = { type: DataTypes.UUID, allowNull: false, primaryKey: true } as const;
export const textColumn = { type: DataTypes.TEXT, allowNull: false } as const;
export const textOrNull = { type: DataTypes.TEXT, allowNull: true } as const;
export const timeColumn = { type: DataTypes.DATE(3), allowNull: false } as const;
export const timeOrNull = { type: DataTypes.DATE(3), allowNull: true } as const;
export const integerColumn = { type: DataTypes.INTEGER, allowNull: false } as const;
export const integerOrNull = { type: DataTypes.INTEGER, allowNull: true } as const;
export const booleanColumn = { type: DataTypes.BOOLEAN, allowNull: false } as const;
export const jsonColumn = { type: DataTypes.JSONB, allowNull: false } as const;
export const numberOrNull = { type: DataTypes.DOUBLE, allowNull: true } as const;
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

/** The model's name is given, since minified class names rename models; no timestamps are kept behind our back. */
export function modelOptions<M extends Model>(sequelize: Sequelize, modelName: string, tableName: string): InitOptions<M> {
  return { sequelize, modelName, tableName, timestamps: false, underscored: true };
}
