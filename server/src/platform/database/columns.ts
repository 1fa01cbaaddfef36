import { DataTypes, type ModelAttributeColumnOptions } from 'sequelize';

/**
 * Column types of the models; the tables themselves are made by the migrations. Each read gives a fresh object, because
 * Sequelize writes the column's name into the one it is given.
 */
export const column = {
  get id() {
    return { type: DataTypes.CHAR(36), primaryKey: true };
  },
  get reference() {
    return { type: DataTypes.CHAR(36) };
  },
  get hash() {
    return { type: DataTypes.CHAR(64) };
  },
  get text() {
    return { type: DataTypes.STRING };
  },
  get longText() {
    return { type: DataTypes.TEXT('long') };
  },
  get integer() {
    return { type: DataTypes.INTEGER };
  },
  get big() {
    return { type: DataTypes.BIGINT };
  },
  get real() {
    return { type: DataTypes.DOUBLE };
  },
  get flag() {
    return { type: DataTypes.BOOLEAN };
  },
  get instant() {
    return { type: DataTypes.DATE(3) };
  },
  get day() {
    return { type: DataTypes.DATEONLY };
  },
  get bytes() {
    return { type: DataTypes.BLOB('long') };
  },
} satisfies Record<string, ModelAttributeColumnOptions>;
