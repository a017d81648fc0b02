import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize } from '../config/database.ts';

/** A club and its settings; `version` counts changes of the settings. */
export class Club extends Model<InferAttributes<Club>, InferCreationAttributes<Club>> {
  declare id: CreationOptional<string>;
  declare slug: string;
  declare name: string;
  declare note: CreationOptional<string>;
  declare contact: CreationOptional<string>;
  declare currency: string;
  declare locale: CreationOptional<string>;
  declare timeZone: CreationOptional<string>;
  declare units: CreationOptional<'metric' | 'us'>;
  declare placeAddress: CreationOptional<string>;
  declare placeNote: CreationOptional<string>;
  declare transferHow: CreationOptional<string>;
  declare joinNeedsApproval: CreationOptional<boolean>;
  declare hideReportableGrams: CreationOptional<boolean>;
  declare shelfLimitMinor: CreationOptional<number>;
  declare precursorMonths: CreationOptional<number>;
  declare isDemo: CreationOptional<boolean>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

Club.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    slug: DataTypes.TEXT,
    name: DataTypes.TEXT,
    note: { type: DataTypes.TEXT, defaultValue: '' },
    contact: { type: DataTypes.TEXT, defaultValue: '' },
    currency: DataTypes.TEXT,
    locale: { type: DataTypes.TEXT, defaultValue: 'en-GB' },
    timeZone: { type: DataTypes.TEXT, defaultValue: 'Europe/London' },
    units: { type: DataTypes.TEXT, defaultValue: 'metric' },
    placeAddress: { type: DataTypes.TEXT, defaultValue: '' },
    placeNote: { type: DataTypes.TEXT, defaultValue: '' },
    transferHow: { type: DataTypes.TEXT, defaultValue: '' },
    joinNeedsApproval: { type: DataTypes.BOOLEAN, defaultValue: true },
    hideReportableGrams: { type: DataTypes.BOOLEAN, defaultValue: false },
    shelfLimitMinor: { type: DataTypes.BIGINT, defaultValue: 0 },
    precursorMonths: { type: DataTypes.INTEGER, defaultValue: 18 },
    isDemo: { type: DataTypes.BOOLEAN, defaultValue: false },
    version: { type: DataTypes.INTEGER, defaultValue: 1 },
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: 'clubs' },
);
