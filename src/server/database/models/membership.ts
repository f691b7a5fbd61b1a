import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize } from '../connection.ts';

export const ROLES = ['learner', 'teacher', 'admin', 'author', 'operator'] as const;
export type Role = (typeof ROLES)[number];

/** One role of one person, in a school or (school null) in Dropwise itself. A person's access is the union of theirs. */
export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  declare id: CreationOptional<number>;
  declare personId: number;
  declare schoolId: number | null;
  declare role: Role;
  declare source: 'purchase' | 'seat' | 'staff';
  declare startsAt: Date;
  declare endsAt: Date | null;
  declare createdAt: CreationOptional<Date>;
}

Membership.init(
  {
    id: { type: DataTypes.BIGINT.UNSIGNED, autoIncrement: true, primaryKey: true },
    personId: { type: DataTypes.BIGINT.UNSIGNED, allowNull: false },
    schoolId: DataTypes.BIGINT.UNSIGNED,
    role: { type: DataTypes.ENUM(...ROLES), allowNull: false },
    source: { type: DataTypes.ENUM('purchase', 'seat', 'staff'), allowNull: false },
    startsAt: { type: DataTypes.DATE(3), allowNull: false },
    endsAt: DataTypes.DATE(3),
    createdAt: DataTypes.DATE(3),
  },
  { sequelize, tableName: 'memberships', modelName: 'Membership', updatedAt: false },
);
