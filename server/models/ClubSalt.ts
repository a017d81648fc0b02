import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import type { CompositionPpm } from '#shared/domain/salts/compositionParts.ts';
import { sequelize, type Tx } from '../config/database.ts';

/** A club's own salt or trace mix; `composition` in parts per million. */
export class ClubSalt extends Model<InferAttributes<ClubSalt>, InferCreationAttributes<ClubSalt>> {
  declare id: CreationOptional<string>;
  declare clubId: string;
  declare kind: 'salt' | 'trace_mix';
  declare name: string;
  declare formula: string | null;
  declare cas: string | null;
  declare composition: CompositionPpm;
  declare hazardStatements: string[];
  declare signalWord: 'Danger' | 'Warning' | null;
  declare storage: CreationOptional<string>;
  declare note: CreationOptional<string>;
  declare archivedAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  /** One of the club's own salts under its row lock, or null. */
  static async lock(clubId: string, id: string, tx: Tx): Promise<ClubSalt | null> {
    return ClubSalt.findOne({
      where: { id, clubId },
      transaction: tx.transaction,
      lock: tx.transaction.LOCK.UPDATE,
    });
  }
}

ClubSalt.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    clubId: DataTypes.UUID,
    kind: DataTypes.TEXT,
    name: DataTypes.TEXT,
    formula: DataTypes.TEXT,
    cas: DataTypes.TEXT,
    composition: DataTypes.JSONB,
    hazardStatements: DataTypes.JSONB,
    signalWord: DataTypes.TEXT,
    storage: { type: DataTypes.TEXT, defaultValue: '' },
    note: { type: DataTypes.TEXT, defaultValue: '' },
    archivedAt: DataTypes.DATE,
    version: { type: DataTypes.INTEGER, defaultValue: 1 },
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: 'club_salts' },
);
