import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import type { Shipping } from '#shared/domain/packs/packTypes.ts';
import { sequelize, type Tx } from '../config/database.ts';

/** Who sells packs to a club; `isShelf` is the club's own stock. */
export class Supplier extends Model<InferAttributes<Supplier>, InferCreationAttributes<Supplier>> {
  declare id: CreationOptional<string>;
  declare clubId: string;
  declare name: string;
  declare contact: CreationOptional<string>;
  declare email: CreationOptional<string>;
  declare website: CreationOptional<string>;
  declare note: CreationOptional<string>;
  declare isShelf: CreationOptional<boolean>;
  declare shipping: Shipping;
  declare freeShippingFromMinor: CreationOptional<number | null>;
  declare minimumOrderMinor: CreationOptional<number | null>;
  declare archivedAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  /** A club's supplier under its row lock, or null. Changes of its offers lock it too, so that they follow one another. */
  static async lock(clubId: string, id: string, tx: Tx): Promise<Supplier | null> {
    return Supplier.findOne({
      where: { id, clubId },
      transaction: tx.transaction,
      lock: tx.transaction.LOCK.UPDATE,
    });
  }
}

Supplier.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    clubId: DataTypes.UUID,
    name: DataTypes.TEXT,
    contact: { type: DataTypes.TEXT, defaultValue: '' },
    email: { type: DataTypes.TEXT, defaultValue: '' },
    website: { type: DataTypes.TEXT, defaultValue: '' },
    note: { type: DataTypes.TEXT, defaultValue: '' },
    isShelf: { type: DataTypes.BOOLEAN, defaultValue: false },
    shipping: DataTypes.JSONB,
    freeShippingFromMinor: DataTypes.BIGINT,
    minimumOrderMinor: DataTypes.BIGINT,
    archivedAt: DataTypes.DATE,
    version: { type: DataTypes.INTEGER, defaultValue: 1 },
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: 'suppliers' },
);
