import type { HandOn, HandOns } from '#shared/schemas/handOns.ts';
import { select, transact, type Tx } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { saltsByIds } from '../salts/saltsOfClub.ts';
import { findHandOns, findOwnLines, type HandOnRow } from './handOnRows.ts';
import { quoteHandOn } from './moveSnapshots.ts';

const lasting = new Set(['locked', 'ordered', 'arrived', 'splitting', 'pickup']);

async function present(
  row: HandOnRow,
  actor: BuyActor,
  salt: { name: string; classified: boolean; reportable: boolean } | undefined,
  confirmed: boolean,
  tx: Tx,
): Promise<HandOn> {
  const mine = row.from_id === actor.membershipId || row.to_id === actor.membershipId;
  const open = row.state === 'offered' && lasting.has(actor.buy.state);
  const hand = {
    buyId: actor.buy.id,
    lineId: row.line_id,
    fromId: row.from_id,
    toId: row.to_id,
  };
  const quote = open ? await quoteHandOn(hand, tx) : null;
  const amountMinor = row.amount_minor ?? quote?.amountMinor ?? null;
  return {
    id: row.id,
    lineId: row.line_id,
    saltId: row.salt_id,
    salt: salt?.name ?? row.salt_id,
    from: { membershipId: row.from_id, name: row.from_name },
    to: { membershipId: row.to_id, name: row.to_name },
    state: row.state,
    mg: row.mg ?? quote?.mg ?? 0,
    amountMinor: mine || actor.buy.organises ? amountMinor : null,
    createdAt: row.created_at.toISOString(),
    answeredAt: row.answered_at?.toISOString() ?? null,
    mayAnswer: open && row.to_id === actor.membershipId,
    mayWithdraw: open && row.from_id === actor.membershipId,
    needsConfirmation: !confirmed && ((salt?.classified ?? false) || (salt?.reportable ?? false)),
    reportable: salt?.reportable ?? false,
  };
}

/** Hand-ons that concern the reader, or all for the buy's organisers; and what the reader could hand on. */
export async function listHandOns(actor: BuyActor): Promise<HandOns> {
  return transact(async (tx) => {
    const me = actor.membershipId;
    const rows = (await findHandOns(actor.buy.id, null, tx)).filter(
      ({ from_id, to_id }) => actor.buy.organises || from_id === me || to_id === me,
    );
    const own = lasting.has(actor.buy.state) ? await findOwnLines(actor.buy.id, me, tx) : [];
    const salts = await saltsByIds(
      actor.club.id,
      [...rows.map(({ salt_id }) => salt_id), ...own.map(({ salt_id }) => salt_id)],
      tx,
    );
    const confirmed = await select<{ salt_id: string }>(
      'select salt_id from hazard_confirmations where membership_id = :me',
      { me },
      tx,
    );
    const read = new Set(confirmed.map(({ salt_id }) => salt_id));
    const offered = new Set(
      rows.filter((row) => row.state === 'offered' && row.from_id === me).map((row) => row.line_id),
    );
    const handOns: HandOn[] = [];
    for (const row of rows)
      handOns.push(await present(row, actor, salts.get(row.salt_id), read.has(row.salt_id), tx));
    const choices: HandOns['choices'] = [];
    for (const line of own) {
      if (offered.has(line.line_id)) continue;
      const hand = { buyId: actor.buy.id, lineId: line.line_id, fromId: me, toId: '' };
      const quote = await quoteHandOn(hand, tx);
      choices.push({
        lineId: line.line_id,
        salt: salts.get(line.salt_id)?.name ?? line.salt_id,
        mg: quote?.mg ?? line.wanted_mg,
        amountMinor: quote?.amountMinor ?? 0,
      });
    }
    return { handOns, choices };
  });
}
