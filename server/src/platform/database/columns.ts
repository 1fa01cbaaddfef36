import { DataTypes } from 'sequelize';

/** Column types of the models; the tables themselves are made by the migrations. */
export const column = {
  id: { type: DataTypes.CHAR(36), primaryKey: true },
  reference: { type: DataTypes.CHAR(36) },
  hash: { type: DataTypes.CHAR(64) },
  text: { type: DataTypes.STRING },
  longText: { type: DataTypes.TEXT('long') },
  integer: { type: DataTypes.INTEGER },
  big: { type: DataTypes.BIGINT },
  real: { type: DataTypes.DOUBLE },
  flag: { type: DataTypes.BOOLEAN },
  instant: { type: DataTypes.DATE(3) },
  day: { type: DataTypes.DATEONLY },
  bytes: { type: DataTypes.BLOB('long') },
} as const;
