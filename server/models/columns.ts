import { DataTypes } from 'sequelize';

/** Column definitions that many tables share. Measured numbers are DOUBLE: exact on the way back. */
export const id = { type: DataTypes.BIGINT.UNSIGNED, primaryKey: true, autoIncrement: true };
export const reference = { type: DataTypes.BIGINT.UNSIGNED, allowNull: false };
export const optionalReference = { type: DataTypes.BIGINT.UNSIGNED, allowNull: true };
export const double = { type: DataTypes.DOUBLE, allowNull: false };
export const optionalDouble = { type: DataTypes.DOUBLE, allowNull: true };
export const count = { type: DataTypes.INTEGER.UNSIGNED, allowNull: false };
export const optionalCount = { type: DataTypes.INTEGER.UNSIGNED, allowNull: true };
export const json = { type: DataTypes.JSON, allowNull: false };
export const optionalJson = { type: DataTypes.JSON, allowNull: true };
export const flag = { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false };
export const moment = { type: DataTypes.DATE(3), allowNull: false };
export const optionalMoment = { type: DataTypes.DATE(3), allowNull: true };
export const text = { type: DataTypes.TEXT, allowNull: false, defaultValue: '' };
export const optionalText = { type: DataTypes.TEXT, allowNull: true };

export const line = (length: number) => ({ type: DataTypes.STRING(length), allowNull: false });
export const version = { type: DataTypes.INTEGER.UNSIGNED, allowNull: false, defaultValue: 0 };

/** When a row was made and last changed: milliseconds, in UTC. */
export const stamps = { createdAt: moment, updatedAt: moment };
