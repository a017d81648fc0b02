import type { BuyHeader } from '#shared/schemas/buys.ts';
import { execute, transact, select, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import { Line } from '../../models/Line.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { saltsByIds } from '../salts/saltsOfClub.ts';
import { newDraft } from './createBuy.ts';
import { readBuyHeaderAgain } from './readBuys.ts';
import { byActor } from './withBuy.ts';

/** Lines of salts that may still be lines, with those of their offers that still live. */
async function copyLines(from: Buy, to: Buy, tx: Tx): Promise<Map<string, string>> {
  const copies = new Map<string, string>();
  const lines = await Line.findAll({
    where: { buyId: from.id, removedAt: null },
    order: ['position', 'id'],
    transaction: tx.transaction,
  });
  const salts = await saltsByIds(
    from.clubId,
    lines.map(({ saltId }) => saltId),
    tx,
  );
  for (const line of lines) {
    const salt = salts.get(line.saltId);
    if (!salt || salt.hidden || salt.archivedAt || salt.lineRefusal !== null) continue;
    const copy = await Line.create(
      {
        buyId: to.id,
        saltId: line.saltId,
        position: copies.size,
        stepMg: line.stepMg,
        reservePermyriad: line.reservePermyriad,
        surplus: line.surplus,
        shortage: line.shortage,
        anyOfSupplierId: line.anyOfSupplierId,
        note: line.note,
      },
      { transaction: tx.transaction },
    );
    copies.set(line.id, copy.id);
    await execute(
      `insert into line_offers (line_id, offer_id) select :copyId, o.id
       from line_offers lo join offers o on o.id = lo.offer_id and o.archived_at is null
       join suppliers s on s.id = o.supplier_id and s.archived_at is null where lo.line_id = :lineId`,
      { copyId: copy.id, lineId: line.id },
      tx,
    );
  }
  return copies;
}

async function copyCharges(
  from: Buy,
  to: Buy,
  lines: ReadonlyMap<string, string>,
  tx: Tx,
): Promise<void> {
  const charges = await select<{ id: string; line_ids: string[] | null }>(
    `select c.id, c.line_ids from charges c left join suppliers s on s.id = c.supplier_id
     where c.buy_id = :buyId and c.removed_at is null and s.archived_at is null order by c.position, c.id`,
    { buyId: from.id },
    tx,
  );
  for (const [position, charge] of charges.entries()) {
    const lineIds = charge.line_ids?.flatMap((id) => lines.get(id) ?? []) ?? null;
    if (lineIds?.length === 0) continue;
    await execute(
      `insert into charges (buy_id, kind, name, amount_minor, basis, supplier_id, line_ids, tax_rate_ppm, position)
       select :buyId, kind, name, amount_minor, basis, supplier_id, :lineIds, tax_rate_ppm, :position
       from charges where id = :id`,
      {
        buyId: to.id,
        lineIds: lineIds === null ? null : JSON.stringify(lineIds),
        position,
        id: charge.id,
      },
      tx,
    );
  }
}

/** A new draft after an earlier buy: its lines, living offers, charges and policies, with new dates. */
export async function copyBuy(actor: BuyActor, name: string | undefined): Promise<BuyHeader> {
  const id = await transact(async (tx) => {
    const from = await Buy.findByPk(actor.buy.id, {
      transaction: tx.transaction,
      rejectOnEmpty: true,
    });
    const fresh = await newDraft(actor, name, tx);
    const buy = await Buy.create(
      {
        ...fresh,
        copiedFromId: from.id,
        place: from.place || fresh.place,
        pickupRules: from.pickupRules,
        minimumKind: from.minimumKind,
        minimumAmount: from.minimumAmount,
        priceLimitPermille: from.priceLimitPermille,
        dueDays: from.dueDays,
        loweringFreezeHours: from.loweringFreezeHours,
        leftOverPayer: from.leftOverPayer,
        shelfLimitMinor: from.shelfLimitMinor,
        spreadMaxPermille: from.spreadMaxPermille,
        bandPermille: from.bandPermille,
        unclaimedDays: from.unclaimedDays,
      },
      { transaction: tx.transaction },
    );
    await copyCharges(from, buy, await copyLines(from, buy, tx), tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'buys.copy',
      subject: { type: 'buy', id: buy.id },
      after: { name: buy.name, copiedFrom: from.name },
    });
    return buy.id;
  });
  return readBuyHeaderAgain(actor, id);
}
