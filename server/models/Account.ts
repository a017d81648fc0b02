import {
  DataTypes,
  Model,
  Op,
  col,
  fn,
  where,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from 'sequelize';
import { sequelize, type Tx } from '../config/database.ts';

/** A person's sign-in; what they may do is on their memberships. */
export class Account extends Model<InferAttributes<Account>, InferCreationAttributes<Account>> {
  declare id: CreationOptional<string>;
  declare email: string;
  declare displayName: string;
  declare passwordHash: string;
  declare deletedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  /** Living account by address, whatever its case; `lock` when it is going to change. */
  static findByEmail(email: string, tx?: Tx, lock = false): Promise<Account | null> {
    return Account.findOne({
      where: {
        [Op.and]: [where(fn('lower', col('email')), email.toLowerCase()), { deletedAt: null }],
      },
      ...(tx
        ? { transaction: tx.transaction, ...(lock ? { lock: tx.transaction.LOCK.UPDATE } : {}) }
        : {}),
    });
  }
}

Account.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    email: DataTypes.TEXT,
    displayName: DataTypes.TEXT,
    passwordHash: DataTypes.TEXT,
    deletedAt: DataTypes.DATE,
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: 'accounts' },
);
