import { DataTypes, Model, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from '../connection.ts';

export type TokenPurpose = 'verify' | 'reset' | 'change-email';

/** A link sent by e-mail, stored as its hash. It works once and ends by itself. */
export class Token extends Model<InferAttributes<Token>, InferCreationAttributes<Token>> {
  declare hash: string;
  declare purpose: TokenPurpose;
  declare personId: number;
  declare email: string | null;
  declare createdAt: Date;
  declare expiresAt: Date;
}

Token.init(
  {
    hash: { type: DataTypes.CHAR(64), primaryKey: true },
    purpose: { type: DataTypes.ENUM('verify', 'reset', 'change-email'), allowNull: false },
    personId: { type: DataTypes.BIGINT.UNSIGNED, allowNull: false },
    email: DataTypes.STRING(254),
    createdAt: { type: DataTypes.DATE(3), allowNull: false },
    expiresAt: { type: DataTypes.DATE(3), allowNull: false },
  },
  { sequelize, tableName: 'tokens', modelName: 'Token', timestamps: false },
);
