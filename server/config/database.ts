import pg from 'pg';
import { QueryTypes, Sequelize, type Transaction } from 'sequelize';
import { logger } from './logger.ts';
import { env } from './runtime.ts';

function safeInteger(text: string): number {
  const value = Number(text);
  if (!Number.isSafeInteger(value))
    throw new RangeError(`bigint ${text} is past the safe integers`);
  return value;
}
pg.types.setTypeParser(pg.types.builtins.INT8, safeInteger);
pg.types.setTypeParser(pg.types.builtins.DATE, (text) => text);

/** Connection pool for the session store and for single prepared reads on hot paths. */
export const pool = new pg.Pool({ connectionString: env.databaseUrl, max: env.databasePool });
pool.on('error', (error) => logger.warn({ err: error }, 'idle database connection lost'));

/** All models live on this connection. */
export const sequelize = new Sequelize(env.databaseUrl, {
  dialect: 'postgres',
  logging: false,
  pool: { max: env.databasePool, idle: 30_000 },
  define: { underscored: true, freezeTableName: true },
});

/** A running transaction, and what is to happen once it is durable. */
export interface Tx {
  readonly transaction: Transaction;
  /** Runs after the commit, in order; a throw is logged and never reaches the caller. */
  afterCommit(act: () => void | Promise<void>): void;
}

const retried = new Set(['40001', '40P01']);

function sqlState(error: unknown): string | undefined {
  const original =
    (error as { original?: { code?: string } }).original ?? (error as { code?: string });
  return original.code;
}

/**
 * One transaction for one use case. Serialization failures and deadlocks run `work` anew (5 tries), so it must
 * read everything inside itself.
 */
export async function transact<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    const acts: (() => void | Promise<void>)[] = [];
    try {
      const result = await sequelize.transaction((transaction) =>
        work({ transaction, afterCommit: (act) => acts.push(act) }),
      );
      for (const act of acts) {
        try {
          await act();
        } catch (error) {
          logger.error({ err: error }, 'after commit');
        }
      }
      return result;
    } catch (error) {
      if (attempt >= 5 || !retried.has(sqlState(error) ?? '')) throw error;
      await new Promise((resolve) => setTimeout(resolve, Math.random() * 20 * attempt));
    }
  }
}

/** Rows of one SQL statement with `:name` replacements; inside a transaction when one is given. */
export async function select<T extends object>(
  sql: string,
  replacements: Record<string, unknown> = {},
  tx?: Tx,
): Promise<T[]> {
  return sequelize.query<T>(sql, {
    type: QueryTypes.SELECT,
    replacements,
    ...(tx ? { transaction: tx.transaction } : {}),
  });
}

/** Runs a statement that returns nothing of interest, with `:name` replacements. */
export async function execute(
  sql: string,
  replacements: Record<string, unknown>,
  tx: Tx,
): Promise<void> {
  await sequelize.query(sql, { replacements, transaction: tx.transaction });
}

/**
 * Rows of one prepared statement on the transaction's own connection, for hot paths: no formatting, planned once.
 * @param values for $1, $2, …
 */
export async function prepared<T extends object>(
  tx: Tx,
  name: string,
  text: string,
  values: unknown[],
): Promise<T[]> {
  // Sequelize keeps the connection of a transaction there, untyped.
  const connection = Reflect.get(tx.transaction, 'connection') as pg.Client;
  return (await connection.query<T>({ name, text, values })).rows;
}

/** The database's clock (not the transaction's start): the only clock that orders pledges and closings. */
export async function databaseNow(tx: Tx): Promise<Date> {
  const [row] = await select<{ now: Date }>('select clock_timestamp() as now', {}, tx);
  if (!row) throw new Error('no clock');
  return row.now;
}

/** Whether an error is a unique violation, optionally of one named constraint or index. */
export function isUniqueViolation(error: unknown, constraint?: string): boolean {
  const original = (error as { original?: { code?: string; constraint?: string } }).original;
  return original?.code === '23505' && (!constraint || original.constraint === constraint);
}
