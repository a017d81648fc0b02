import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize } from '../config/database.ts';

/** Grams a member wants on a line; `at` is when `wanted` was last raised and decides who comes first. */
export class Pledge extends Model<InferAttributes<Pledge>, InferCreationAttributes<Pledge>> {
  declare id: CreationOptional<string>;
  declare buyId: string;
  declare lineId: string;
  declare membershipId: string;
  declare wantedMg: number;
  declare upToMg: CreationOptional<number | null>;
  declare at: Date;
  declare version: CreationOptional<number>;
  declare changedSheetVersion: CreationOptional<number>;
  declare droppedAt: CreationOptional<Date | null>;
  declare droppedReason: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

Pledge.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    buyId: DataTypes.UUID,
    lineId: DataTypes.UUID,
    membershipId: DataTypes.UUID,
    wantedMg: DataTypes.BIGINT,
    upToMg: DataTypes.BIGINT,
    at: DataTypes.DATE(3),
    version: { type: DataTypes.INTEGER, defaultValue: 1 },
    changedSheetVersion: { type: DataTypes.INTEGER, defaultValue: 1 },
    droppedAt: DataTypes.DATE,
    droppedReason: DataTypes.TEXT,
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: 'pledges' },
);
