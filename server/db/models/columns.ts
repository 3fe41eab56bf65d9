/** Columns that several models share in kind. */
import { DataTypes, type DataType } from 'sequelize';

/** May be empty, and then reads null from the start: without a default a new row would read undefined. */
export const nullable = (type: DataType) => ({ type, defaultValue: null });

/** Counted up by Sequelize at every change of the row. */
export const versionColumn = { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 };
