import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize } from '../config/database.ts';

/** One salt in a buy. It draws on chosen offers, or on any offer of one supplier. */
export class Line extends Model<InferAttributes<Line>, InferCreationAttributes<Line>> {
  declare id: CreationOptional<string>;
  declare buyId: string;
  declare saltId: string;
  declare position: number;
  declare stepMg: CreationOptional<number>;
  declare reservePermyriad: CreationOptional<number>;
  declare surplus: CreationOptional<'spread' | 'shelf'>;
  declare shortage: CreationOptional<'scale' | 'queue'>;
  declare anyOfSupplierId: CreationOptional<string | null>;
  declare note: CreationOptional<string>;
  declare unaccountedNote: CreationOptional<string>;
  declare removedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

Line.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    buyId: DataTypes.UUID,
    saltId: DataTypes.TEXT,
    position: DataTypes.INTEGER,
    stepMg: { type: DataTypes.BIGINT, defaultValue: 1000 },
    reservePermyriad: { type: DataTypes.INTEGER, defaultValue: 50 },
    surplus: { type: DataTypes.TEXT, defaultValue: 'spread' },
    shortage: { type: DataTypes.TEXT, defaultValue: 'scale' },
    anyOfSupplierId: DataTypes.UUID,
    note: { type: DataTypes.TEXT, defaultValue: '' },
    unaccountedNote: { type: DataTypes.TEXT, defaultValue: '' },
    removedAt: DataTypes.DATE,
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: 'lines' },
);
