import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize } from '../connection.ts';

export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
  declare id: CreationOptional<number>;
  /** What other people and addresses see; ids never leave the server. */
  declare publicId: string;
  declare email: string | null;
  declare emailVerifiedAt: Date | null;
  declare displayName: string;
  declare passwordHash: string | null;
  declare lang: CreationOptional<string>;
  declare conventions: Record<string, string> | null;
  declare disabledAt: Date | null;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

Person.init(
  {
    id: { type: DataTypes.BIGINT.UNSIGNED, autoIncrement: true, primaryKey: true },
    publicId: { type: DataTypes.CHAR(36), allowNull: false },
    email: DataTypes.STRING(254),
    emailVerifiedAt: DataTypes.DATE(3),
    displayName: { type: DataTypes.STRING(120), allowNull: false },
    passwordHash: DataTypes.STRING(255),
    lang: { type: DataTypes.STRING(12), allowNull: false, defaultValue: 'en-GB' },
    conventions: DataTypes.JSON,
    disabledAt: DataTypes.DATE(3),
    createdAt: DataTypes.DATE(3),
    updatedAt: DataTypes.DATE(3),
  },
  { sequelize, tableName: 'people', modelName: 'Person' },
);
