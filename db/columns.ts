import { DataTypes, type ModelAttributeColumnOptions } from 'sequelize';

type Column = ModelAttributeColumnOptions;

export const id = (): Column => ({ type: DataTypes.INTEGER.UNSIGNED, autoIncrement: true, primaryKey: true });
export const ref = (): Column => ({ type: DataTypes.INTEGER.UNSIGNED, allowNull: false });
export const refOrNull = (): Column => ({ type: DataTypes.INTEGER.UNSIGNED, allowNull: true });
export const text = (): Column => ({ type: DataTypes.TEXT, allowNull: false, defaultValue: '' });
export const longText = (): Column => ({
  type: DataTypes.TEXT('medium'),
  allowNull: false,
  defaultValue: '',
});
export const word = (length = 190, otherwise: string | undefined = ''): Column => ({
  type: DataTypes.STRING(length),
  allowNull: false,
  defaultValue: otherwise,
});
export const wordOrNull = (length = 190): Column => ({ type: DataTypes.STRING(length), allowNull: true });
export const whole = (otherwise?: number): Column => ({
  type: DataTypes.INTEGER,
  allowNull: false,
  defaultValue: otherwise,
});
export const wholeOrNull = (): Column => ({ type: DataTypes.INTEGER, allowNull: true });
export const real = (): Column => ({ type: DataTypes.DOUBLE, allowNull: false });
export const realOrNull = (): Column => ({ type: DataTypes.DOUBLE, allowNull: true });
export const moment = (): Column => ({ type: DataTypes.DATE(3), allowNull: false });
export const momentOrNull = (): Column => ({ type: DataTypes.DATE(3), allowNull: true });
export const yes = (otherwise = false): Column => ({
  type: DataTypes.BOOLEAN,
  allowNull: false,
  defaultValue: otherwise,
});
