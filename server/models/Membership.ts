import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize } from '../config/database.ts';

/** A person in a club: with sign-in, or a guest without. Roles stand in any combination. */
export class Membership extends Model<
  InferAttributes<Membership>,
  InferCreationAttributes<Membership>
> {
  declare id: CreationOptional<string>;
  declare clubId: string;
  declare accountId: CreationOptional<string | null>;
  declare status: CreationOptional<'pending' | 'active' | 'left' | 'removed'>;
  declare displayName: string;
  declare isOrganiser: CreationOptional<boolean>;
  declare isTreasurer: CreationOptional<boolean>;
  declare isSteward: CreationOptional<boolean>;
  declare isGuest: CreationOptional<boolean>;
  declare guestContact: CreationOptional<string>;
  declare vouchedById: CreationOptional<string | null>;
  declare legalName: CreationOptional<string | null>;
  declare noticeOff: CreationOptional<string[]>;
  declare version: CreationOptional<number>;
  declare joinedAt: CreationOptional<Date>;
  declare endedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

Membership.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    clubId: DataTypes.UUID,
    accountId: DataTypes.UUID,
    status: { type: DataTypes.TEXT, defaultValue: 'active' },
    displayName: DataTypes.TEXT,
    isOrganiser: { type: DataTypes.BOOLEAN, defaultValue: false },
    isTreasurer: { type: DataTypes.BOOLEAN, defaultValue: false },
    isSteward: { type: DataTypes.BOOLEAN, defaultValue: false },
    isGuest: { type: DataTypes.BOOLEAN, defaultValue: false },
    guestContact: { type: DataTypes.TEXT, defaultValue: '' },
    vouchedById: DataTypes.UUID,
    legalName: DataTypes.TEXT,
    noticeOff: { type: DataTypes.JSONB, defaultValue: [] },
    version: { type: DataTypes.INTEGER, defaultValue: 1 },
    joinedAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW },
    endedAt: DataTypes.DATE,
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: 'memberships' },
);
