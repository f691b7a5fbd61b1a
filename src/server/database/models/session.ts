import { DataTypes, Model, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from '../connection.ts';

/** A signed-in browser. The token itself is never stored, only its SHA-256. */
export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
  declare idHash: string;
  declare publicId: string;
  declare personId: number;
  declare createdAt: Date;
  /** Idle end: moves on with use. */
  declare expiresAt: Date;
  /** Absolute end: never moves. */
  declare endsAt: Date;
  declare device: string;
}

Session.init(
  {
    idHash: { type: DataTypes.CHAR(64), primaryKey: true },
    publicId: { type: DataTypes.CHAR(36), allowNull: false },
    personId: { type: DataTypes.BIGINT.UNSIGNED, allowNull: false },
    createdAt: { type: DataTypes.DATE(3), allowNull: false },
    expiresAt: { type: DataTypes.DATE(3), allowNull: false },
    endsAt: { type: DataTypes.DATE(3), allowNull: false },
    device: { type: DataTypes.STRING(200), allowNull: false },
  },
  { sequelize, tableName: 'sessions', modelName: 'Session', timestamps: false },
);
