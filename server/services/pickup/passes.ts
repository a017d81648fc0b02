import { createHmac, timingSafeEqual } from 'node:crypto';
import { readPass, writePass } from '#shared/domain/pickup/passCode.ts';
import { env } from '../../config/runtime.ts';
import { select, type Tx } from '../../config/database.ts';
import { invalid, notFound } from '../problem.ts';

/** A member's pass for one buy: derived, so that it can be shown again, and guessed by nobody. */
export function passOf(buyId: string, membershipId: string): string {
  const digest = createHmac('sha256', env.sessionSecret)
    .update(`pass:${buyId}:${membershipId}`)
    .digest();
  return writePass(digest.subarray(0, 10));
}

function same(a: string, b: string): boolean {
  return a.length === b.length && timingSafeEqual(Buffer.from(a), Buffer.from(b));
}

/**
 * Whose pass this is among those who have a portion in the buy. It names the person and lets nobody do anything.
 * @throws DomainProblem 422 when it was mistyped, 404 when it is nobody's here
 */
export async function findByPass(buyId: string, text: string, tx?: Tx): Promise<string> {
  const pass = readPass(text);
  if (!pass) throw invalid({ pass: 'That is no pass: check it mark by mark.' });
  const rows = await select<{ membership_id: string }>(
    'select distinct membership_id from portions where buy_id = :buyId',
    { buyId },
    tx,
  );
  const found = rows.find(({ membership_id: id }) => same(passOf(buyId, id), pass));
  if (!found) throw notFound('A pass like that');
  return found.membership_id;
}
