import type { ChargeBody, TermsBody, TermsReply } from '#shared/schemas/buyTerms.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { invalid, notFound } from '../problem.ts';
import { askedFields, editTerms } from './editTerms.ts';
import type { Say } from './sayTerms.ts';

const states = ['draft', 'open'] as const;
const edits = { states, movesSums: true };

type Fields = Omit<ChargeBody, 'termsVersion' | 'preview'>;

const bases: Record<ChargeBody['basis'], string> = {
  mass: 'by weight',
  value: 'by value',
  member: 'equally',
  portion: 'by portion',
};

function sayCharge({ name, amountMinor, basis }: Fields, say: Say): string {
  return `${name} ${say.money(amountMinor)}, shared ${bases[basis]}`;
}

function sayChange(before: Fields, after: Fields, say: Say): string {
  const same = before.basis === after.basis && before.name === after.name;
  return same && before.amountMinor !== after.amountMinor
    ? `${after.name} ${say.money(after.amountMinor)}, before ${say.money(before.amountMinor)}.`
    : `Now ${sayCharge(after, say)}. Before: ${sayCharge(before, say)}.`;
}

async function check(buy: Buy, charge: Fields, tx: Tx): Promise<void> {
  const errors: Record<string, string> = {};
  if (charge.kind === 'rebate' ? charge.amountMinor > 0 : charge.amountMinor < 0)
    errors.amountMinor = 'Only a rebate is below zero, and it always is.';
  if (charge.amountMinor === 0) errors.amountMinor = 'Write an amount.';
  if (charge.supplierId !== null && charge.lineIds !== null)
    errors.lineIds = 'Choose a supplier or lines, not both.';
  if (charge.supplierId !== null) {
    const [supplier] = await select<{ id: string }>(
      'select id from suppliers where id = :id and club_id = :clubId and archived_at is null',
      { id: charge.supplierId, clubId: buy.clubId },
      tx,
    );
    if (!supplier) errors.supplierId = "This supplier isn't on the list of the club.";
  }
  if (charge.lineIds !== null) {
    const rows = await select<{ id: string }>(
      'select id from lines where buy_id = :buyId and removed_at is null and id in (:ids)',
      { buyId: buy.id, ids: charge.lineIds },
      tx,
    );
    if (rows.length < new Set(charge.lineIds).size)
      errors.lineIds = 'One of these lines is no longer in the buy.';
  }
  if (Object.keys(errors).length > 0) throw invalid(errors);
}

function row(charge: Fields) {
  return { ...charge, lineIds: charge.lineIds === null ? null : JSON.stringify(charge.lineIds) };
}

async function getCharge(
  buy: Buy,
  chargeId: string,
  tx: Tx,
): Promise<Fields & { removed: boolean }> {
  const [charge] = await select<Fields & { removed: boolean }>(
    `select kind, name, amount_minor as "amountMinor", basis, supplier_id as "supplierId", line_ids as "lineIds",
        tax_rate_ppm as "taxRatePpm", removed_at is not null as removed
     from charges where id = :chargeId and buy_id = :buyId`,
    { chargeId, buyId: buy.id },
    tx,
  );
  if (!charge) throw notFound('This charge');
  return charge;
}

/** Adds a cost or rebate that several share. */
export async function addCharge(actor: BuyActor, body: ChargeBody): Promise<TermsReply> {
  return editTerms(actor, body, edits, async (buy, tx, say) => {
    const charge = askedFields(body);
    await check(buy, charge, tx);
    const [made] = await select<{ id: string }>(
      `insert into charges (buy_id, kind, name, amount_minor, basis, supplier_id, line_ids, tax_rate_ppm, position)
       values (:buyId, :kind, :name, :amountMinor, :basis, :supplierId, :lineIds, :taxRatePpm,
         (select coalesce(max(position), -1) + 1 from charges where buy_id = :buyId)) returning id`,
      { buyId: buy.id, ...row(charge) },
      tx,
    );
    if (!made) throw new Error('charge not written');
    return {
      summary: `New: ${sayCharge(charge, say)}.`,
      action: 'buys.addCharge',
      subject: { type: 'charge', id: made.id },
      after: charge,
    };
  });
}

/** Changes a charge. */
export async function changeCharge(
  actor: BuyActor,
  chargeId: string,
  body: ChargeBody,
): Promise<TermsReply> {
  return editTerms(actor, body, edits, async (buy, tx, say) => {
    const { removed, ...before } = await getCharge(buy, chargeId, tx);
    if (removed) throw notFound('This charge');
    const after = askedFields(body);
    const keys = Object.keys(after) as (keyof Fields)[];
    if (keys.every((key) => JSON.stringify(after[key]) === JSON.stringify(before[key])))
      return null;
    await check(buy, after, tx);
    await execute(
      `update charges set kind = :kind, name = :name, amount_minor = :amountMinor, basis = :basis,
         supplier_id = :supplierId, line_ids = :lineIds, tax_rate_ppm = :taxRatePpm, updated_at = now()
       where id = :chargeId`,
      { chargeId, ...row(after) },
      tx,
    );
    return {
      summary: sayChange(before, after, say),
      action: 'buys.changeCharge',
      subject: { type: 'charge', id: chargeId },
      before,
      after,
    };
  });
}

async function setRemoved(chargeId: string, removed: boolean, tx: Tx): Promise<void> {
  await execute(
    `update charges set removed_at = ${removed ? 'now()' : 'null'}, updated_at = now() where id = :chargeId`,
    { chargeId },
    tx,
  );
}

/** Takes a charge out of the buy. */
export async function removeCharge(
  actor: BuyActor,
  chargeId: string,
  body: TermsBody,
): Promise<TermsReply> {
  return editTerms(actor, body, edits, async (buy, tx, say) => {
    const { removed, ...before } = await getCharge(buy, chargeId, tx);
    if (removed) return null;
    await setRemoved(chargeId, true, tx);
    return {
      summary: `Gone: ${sayCharge(before, say)}.`,
      action: 'buys.removeCharge',
      subject: { type: 'charge', id: chargeId },
      before,
    };
  });
}

/** Puts a charge back that was just taken out of a draft. */
export async function restoreCharge(
  actor: BuyActor,
  chargeId: string,
  body: TermsBody,
): Promise<TermsReply> {
  return editTerms(actor, body, { states: ['draft'], movesSums: false }, async (buy, tx, say) => {
    const { removed, ...charge } = await getCharge(buy, chargeId, tx);
    if (!removed) return null;
    await setRemoved(chargeId, false, tx);
    return {
      summary: `Back: ${sayCharge(charge, say)}.`,
      action: 'buys.restoreCharge',
      subject: { type: 'charge', id: chargeId },
    };
  });
}
