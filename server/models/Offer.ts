import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize, type Tx } from '../config/database.ts';

/** A pack size of one salt at a supplier's price; every price it had stands in `offer_prices`. */
export class Offer extends Model<InferAttributes<Offer>, InferCreationAttributes<Offer>> {
  declare id: CreationOptional<string>;
  declare clubId: string;
  declare supplierId: string;
  declare saltId: string;
  declare label: CreationOptional<string>;
  declare packMg: number;
  declare priceMinor: number;
  declare priceIncludesTax: CreationOptional<boolean>;
  declare taxRatePpm: CreationOptional<number>;
  declare stockPacks: CreationOptional<number | null>;
  declare multipleOf: CreationOptional<number>;
  declare link: CreationOptional<string>;
  declare archivedAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  /** An offer of a supplier under its row lock, or null. */
  static async lock(supplierId: string, id: string, tx: Tx): Promise<Offer | null> {
    return Offer.findOne({
      where: { id, supplierId },
      transaction: tx.transaction,
      lock: tx.transaction.LOCK.UPDATE,
    });
  }
}

Offer.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    clubId: DataTypes.UUID,
    supplierId: DataTypes.UUID,
    saltId: DataTypes.TEXT,
    label: { type: DataTypes.TEXT, defaultValue: '' },
    packMg: DataTypes.BIGINT,
    priceMinor: DataTypes.BIGINT,
    priceIncludesTax: { type: DataTypes.BOOLEAN, defaultValue: true },
    taxRatePpm: { type: DataTypes.INTEGER, defaultValue: 0 },
    stockPacks: DataTypes.INTEGER,
    multipleOf: { type: DataTypes.INTEGER, defaultValue: 1 },
    link: { type: DataTypes.TEXT, defaultValue: '' },
    archivedAt: DataTypes.DATE,
    version: { type: DataTypes.INTEGER, defaultValue: 1 },
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: 'offers' },
);
