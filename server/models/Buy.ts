import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import type { BuyState } from '#shared/domain/buys/states.ts';
import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import { sequelize, type Tx } from '../config/database.ts';

/**
 * One pooled order. `termsVersion` counts changes of state, lines, offers, charges, policies and times;
 * `sheetVersion` every change that the sheet shows; `plan` is the newest computed pack plan, for `planVersion`.
 */
export class Buy extends Model<InferAttributes<Buy>, InferCreationAttributes<Buy>> {
  declare id: CreationOptional<string>;
  declare clubId: string;
  declare name: string;
  declare state: CreationOptional<BuyState>;
  declare responsibleId: string;
  declare offeredToId: CreationOptional<string | null>;
  declare termsVersion: CreationOptional<number>;
  declare sheetVersion: CreationOptional<number>;
  declare minimumKind: CreationOptional<'none' | 'mass' | 'value' | 'members'>;
  declare minimumAmount: CreationOptional<number>;
  declare priceLimitPermille: CreationOptional<number>;
  declare dueDays: CreationOptional<number>;
  declare dueAt: CreationOptional<Date | null>;
  declare closesAt: CreationOptional<Date | null>;
  declare frozenAt: CreationOptional<Date | null>;
  declare frozenUntil: CreationOptional<Date | null>;
  declare splitsAt: CreationOptional<Date | null>;
  declare splitEndsAt: CreationOptional<Date | null>;
  declare place: CreationOptional<string>;
  declare pickupRules: CreationOptional<string>;
  declare note: CreationOptional<string>;
  declare loweringFreezeHours: CreationOptional<number>;
  declare leftOverPayer: CreationOptional<'members' | 'shelf'>;
  declare shelfLimitMinor: CreationOptional<number>;
  declare spreadMaxPermille: CreationOptional<number>;
  declare bandPermille: CreationOptional<number>;
  declare unclaimedDays: CreationOptional<number>;
  declare targetVersion: CreationOptional<number>;
  declare plan: CreationOptional<PackPlan | null>;
  declare planVersion: CreationOptional<number | null>;
  declare planOverride: CreationOptional<Record<string, number> | null>;
  declare copiedFromId: CreationOptional<string | null>;
  declare reopenReason: CreationOptional<string | null>;
  declare cancelReason: CreationOptional<string | null>;
  declare openedAt: CreationOptional<Date | null>;
  declare lockedAt: CreationOptional<Date | null>;
  declare orderedAt: CreationOptional<Date | null>;
  declare arrivedAt: CreationOptional<Date | null>;
  declare splittingAt: CreationOptional<Date | null>;
  declare pickupAt: CreationOptional<Date | null>;
  declare settledAt: CreationOptional<Date | null>;
  declare cancelledAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  /** The buy under its row lock: the first read of every use case that changes something in it. */
  static async lock(buyId: string, tx: Tx): Promise<Buy> {
    return Buy.findByPk(buyId, {
      transaction: tx.transaction,
      lock: tx.transaction.LOCK.UPDATE,
      rejectOnEmpty: true,
    });
  }
}

Buy.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    clubId: DataTypes.UUID,
    name: DataTypes.TEXT,
    state: { type: DataTypes.TEXT, defaultValue: 'draft' },
    responsibleId: DataTypes.UUID,
    offeredToId: DataTypes.UUID,
    termsVersion: { type: DataTypes.INTEGER, defaultValue: 1 },
    sheetVersion: { type: DataTypes.INTEGER, defaultValue: 1 },
    minimumKind: { type: DataTypes.TEXT, defaultValue: 'none' },
    minimumAmount: { type: DataTypes.BIGINT, defaultValue: 0 },
    priceLimitPermille: { type: DataTypes.INTEGER, defaultValue: 100 },
    dueDays: { type: DataTypes.INTEGER, defaultValue: 5 },
    dueAt: DataTypes.DATE,
    closesAt: DataTypes.DATE,
    frozenAt: DataTypes.DATE,
    frozenUntil: DataTypes.DATE,
    splitsAt: DataTypes.DATE,
    splitEndsAt: DataTypes.DATE,
    place: { type: DataTypes.TEXT, defaultValue: '' },
    pickupRules: { type: DataTypes.TEXT, defaultValue: '' },
    note: { type: DataTypes.TEXT, defaultValue: '' },
    loweringFreezeHours: { type: DataTypes.INTEGER, defaultValue: 24 },
    leftOverPayer: { type: DataTypes.TEXT, defaultValue: 'members' },
    shelfLimitMinor: { type: DataTypes.BIGINT, defaultValue: 0 },
    spreadMaxPermille: { type: DataTypes.INTEGER, defaultValue: 100 },
    bandPermille: { type: DataTypes.INTEGER, defaultValue: 5 },
    unclaimedDays: { type: DataTypes.INTEGER, defaultValue: 60 },
    targetVersion: { type: DataTypes.INTEGER, defaultValue: 0 },
    plan: DataTypes.JSONB,
    planVersion: DataTypes.INTEGER,
    planOverride: DataTypes.JSONB,
    copiedFromId: DataTypes.UUID,
    reopenReason: DataTypes.TEXT,
    cancelReason: DataTypes.TEXT,
    openedAt: DataTypes.DATE,
    lockedAt: DataTypes.DATE,
    orderedAt: DataTypes.DATE,
    arrivedAt: DataTypes.DATE,
    splittingAt: DataTypes.DATE,
    pickupAt: DataTypes.DATE,
    settledAt: DataTypes.DATE,
    cancelledAt: DataTypes.DATE,
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: 'buys' },
);
