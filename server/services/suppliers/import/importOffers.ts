import type { ImportDone, ImportPreview, ImportRules } from '#shared/schemas/offerImport.ts';
import { transact, type Tx } from '../../../config/database.ts';
import { Offer } from '../../../models/Offer.ts';
import type { ClubActor } from '../../actors.ts';
import { writeAudit } from '../../audit/writeAudit.ts';
import { offersChanged, type OfferChanged } from '../../buys/offersChanged.ts';
import { byActor } from '../../buys/withBuy.ts';
import { forbidden, invalid, stale, wrongState } from '../../problem.ts';
import { listSalts } from '../../salts/saltsOfClub.ts';
import { insertOffer, writeOffer } from '../changeOffer.ts';
import { lockSellingSupplier } from '../changeSupplier.ts';
import { getSupplier, listOffers } from '../readSuppliers.ts';
import { planImport } from './planImport.ts';
import { readTable } from './readTable.ts';

type ImportFile = { bytes: Buffer } | undefined;

function tableOf(file: ImportFile) {
  if (!file || file.bytes.length === 0) throw invalid({ file: 'Choose a CSV file.' });
  return readTable(file.bytes);
}

async function groundOf(actor: ClubActor, supplierId: string, tx?: Tx) {
  const clubId = actor.club.id;
  return {
    currency: actor.club.currency,
    salts: await listSalts(clubId, tx),
    offers: await listOffers(clubId, supplierId, tx),
  };
}

/**
 * Shows what an import would do, every bad row with its reasons; writes nothing.
 * @throws DomainProblem 404; 403 for the shelf; 409 for an archived supplier; 422 at `file` when it is no table
 */
export async function previewImport(
  actor: ClubActor,
  supplierId: string,
  rules: ImportRules,
  file: ImportFile,
): Promise<ImportPreview> {
  const supplier = await getSupplier(actor.club.id, supplierId);
  if (supplier.isShelf)
    throw forbidden('The shelf follows the club’s stock and is not edited here.');
  if (supplier.archivedAt) throw wrongState('This supplier is archived. Bring it back first.');
  return planImport(tableOf(file), rules, await groundOf(actor, supplierId));
}

/**
 * Does what the preview showed, all of it or nothing, in one transaction; open buys are told once.
 * @throws DomainProblem 409 `stale` with the new preview when offers have changed since; 422 with bad rows that weren't
 * to be left out, or nothing to do
 */
export async function importOffers(
  actor: ClubActor,
  supplierId: string,
  choice: { rules: ImportRules; seen: string; leaveOutBad: 'yes' | 'no' },
  file: ImportFile,
): Promise<ImportDone> {
  const table = tableOf(file);
  return transact(async (tx) => {
    const supplier = await lockSellingSupplier(actor, supplierId, tx);
    const plan = planImport(table, choice.rules, await groundOf(actor, supplierId, tx));
    if (plan.seen !== choice.seen) {
      throw stale('Offers of this supplier changed since the preview. Look at it again.', plan);
    }
    if (plan.counts.bad > 0 && choice.leaveOutBad === 'no') {
      throw invalid({
        leaveOutBad: `${plan.counts.bad} rows have mistakes. Mend them, or leave them out.`,
      });
    }
    if (plan.counts.new + plan.counts.change === 0) {
      throw invalid({ file: 'There is nothing to save in this table.' });
    }
    const changes: OfferChanged[] = [];
    for (const row of plan.rows) {
      if (!row.offer) continue;
      if (row.kind === 'new') {
        changes.push(...(await insertOffer(actor, supplier, row.offer, tx)).changes);
      } else if (row.kind === 'change' && row.offerId) {
        const offer = await Offer.lock(supplierId, row.offerId, tx);
        if (offer) changes.push(...(await writeOffer(actor, supplier, offer, row.offer, tx)));
      }
    }
    const done = {
      added: plan.counts.new,
      changed: plan.counts.change,
      same: plan.counts.same,
      leftOut: plan.counts.bad,
    };
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'offers.import',
      subject: { type: 'supplier', id: supplierId },
      after: done,
    });
    await offersChanged(tx, changes, byActor(actor));
    return done;
  });
}
