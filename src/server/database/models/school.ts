import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize } from '../connection.ts';

export class School extends Model<InferAttributes<School>, InferCreationAttributes<School>> {
  declare id: CreationOptional<number>;
  declare publicId: string;
  declare name: string;
  /** What its people type when they sign in without an e-mail address. */
  declare code: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

School.init(
  {
    id: { type: DataTypes.BIGINT.UNSIGNED, autoIncrement: true, primaryKey: true },
    publicId: { type: DataTypes.CHAR(36), allowNull: false },
    name: { type: DataTypes.STRING(160), allowNull: false },
    code: { type: DataTypes.STRING(12), allowNull: false },
    createdAt: DataTypes.DATE(3),
    updatedAt: DataTypes.DATE(3),
  },
  { sequelize, tableName: 'schools', modelName: 'School' },
);
