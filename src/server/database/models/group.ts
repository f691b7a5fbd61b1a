import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize } from '../connection.ts';

/** A teacher's class. */
export class Group extends Model<InferAttributes<Group>, InferCreationAttributes<Group>> {
  declare id: CreationOptional<number>;
  declare publicId: string;
  declare schoolId: number;
  declare name: string;
  declare createdAt: CreationOptional<Date>;
}

Group.init(
  {
    id: { type: DataTypes.BIGINT.UNSIGNED, autoIncrement: true, primaryKey: true },
    publicId: { type: DataTypes.CHAR(36), allowNull: false },
    schoolId: { type: DataTypes.BIGINT.UNSIGNED, allowNull: false },
    name: { type: DataTypes.STRING(80), allowNull: false },
    createdAt: DataTypes.DATE(3),
  },
  { sequelize, tableName: 'school_groups', modelName: 'Group', updatedAt: false },
);

export class GroupPerson extends Model<InferAttributes<GroupPerson>, InferCreationAttributes<GroupPerson>> {
  declare groupId: number;
  declare personId: number;
  declare role: 'learner' | 'teacher';
}

GroupPerson.init(
  {
    groupId: { type: DataTypes.BIGINT.UNSIGNED, primaryKey: true },
    personId: { type: DataTypes.BIGINT.UNSIGNED, primaryKey: true },
    role: { type: DataTypes.ENUM('learner', 'teacher'), allowNull: false },
  },
  { sequelize, tableName: 'group_people', modelName: 'GroupPerson', timestamps: false },
);
