import { createHash, randomBytes } from 'node:crypto';
import { execute, select, type Tx } from '../../config/database.ts';
import { DomainProblem } from '../problem.ts';

/** A secret for a link: 256 random bits, in characters that a URL carries unchanged. */
export function makeToken(): string {
  return randomBytes(32).toString('base64url');
}

/** What the database keeps of a token: nobody who reads it can make the link. */
export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

/** The same words for a link that was used, has run out, was replaced or never existed. */
export function tokenSpent(what: string): DomainProblem {
  return new DomainProblem(409, 'token_spent', `${what} was used, has expired or was replaced.`);
}

export interface AccountToken {
  readonly id: string;
  readonly accountId: string;
  readonly email: string;
  readonly newEmail: string | null;
}

/** One new token of a kind for an account; earlier ones of that kind stop working. */
export async function issueAccountToken(
  tx: Tx,
  wanted: { accountId: string; kind: 'reset' | 'email'; minutes: number; newEmail?: string },
): Promise<{ id: string; token: string }> {
  const token = makeToken();
  await execute(
    'delete from account_tokens where account_id = :accountId and kind = :kind and used_at is null',
    { accountId: wanted.accountId, kind: wanted.kind },
    tx,
  );
  const [row] = await select<{ id: string }>(
    `insert into account_tokens (account_id, kind, token_hash, new_email, expires_at)
     values (:accountId, :kind, :hash, :newEmail, clock_timestamp() + make_interval(mins => :minutes))
     returning id`,
    {
      accountId: wanted.accountId,
      kind: wanted.kind,
      hash: hashToken(token),
      newEmail: wanted.newEmail ?? null,
      minutes: wanted.minutes,
    },
    tx,
  );
  if (!row) throw new Error('token not written');
  return { id: row.id, token };
}

const living = `from account_tokens t join accounts a on a.id = t.account_id and a.deleted_at is null
  where t.token_hash = :hash and t.kind = :kind and t.used_at is null and t.expires_at > clock_timestamp()`;
const columns = 't.id, t.account_id as "accountId", a.email, t.new_email as "newEmail"';

/** A token that still works, or null; it stays unused. */
export async function findAccountToken(
  kind: 'reset' | 'email',
  token: string,
): Promise<AccountToken | null> {
  const [row] = await select<AccountToken>(`select ${columns} ${living}`, {
    kind,
    hash: hashToken(token),
  });
  return row ?? null;
}

/** Takes a token: of two at once only one gets it, the other null. */
export async function takeAccountToken(
  tx: Tx,
  kind: 'reset' | 'email',
  token: string,
): Promise<AccountToken | null> {
  const [row] = await select<AccountToken>(
    `select ${columns} ${living} for update of t`,
    { kind, hash: hashToken(token) },
    tx,
  );
  if (!row) return null;
  await execute(
    'update account_tokens set used_at = clock_timestamp() where id = :id',
    { id: row.id },
    tx,
  );
  return row;
}
