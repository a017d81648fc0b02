import { execute, select, type Tx } from '../../config/database.ts';
import { Offer } from '../../models/Offer.ts';
import { Supplier } from '../../models/Supplier.ts';
import { offerFields } from '../../presenters/suppliers.ts';
import type { By } from '../actorName.ts';
import type { ActorClub } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { offersChanged, type OfferChanged } from '../buys/offersChanged.ts';
import { saltsByIds } from '../salts/saltsOfClub.ts';
import { describeOfferChange } from '../suppliers/offerWords.ts';
import { matchOffers, offerTerms, shelfGroups, type ShelfGroup } from './shelfOffers.ts';

const shelfName = 'Our shelf';

/** The club's shelf among its suppliers, under its lock; null while there is none and none is needed. */
async function lockShelf(club: ActorClub, needed: boolean, by: By, tx: Tx) {
  // Its row may not be there yet, so something else lets one follow the other.
  await select(
    'select pg_advisory_xact_lock(hashtextextended(:key, 0))::text',
    { key: `shelf:${club.id}` },
    tx,
  );
  const shelf = await Supplier.findOne({
    where: { clubId: club.id, isShelf: true },
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  if (shelf || !needed) return shelf;
  const [twin] = await select<{ id: string }>(
    'select id from suppliers where club_id = :clubId and archived_at is null and lower(name) = lower(:name)',
    { clubId: club.id, name: shelfName },
    tx,
  );
  const made = await Supplier.create(
    {
      clubId: club.id,
      name: twin ? `${shelfName} (the club’s own stock)` : shelfName,
      isShelf: true,
      shipping: { kind: 'flat', minor: 0 },
    },
    { transaction: tx.transaction },
  );
  await writeAudit(tx, {
    clubId: club.id,
    by,
    action: 'suppliers.add',
    subject: { type: 'supplier', id: made.id },
    after: { name: made.name },
  });
  return made;
}

async function keepPrice(offer: Offer, by: By, tx: Tx): Promise<void> {
  await execute(
    `insert into offer_prices (offer_id, price_minor, price_includes_tax, tax_rate_ppm, set_by_id)
     values (:offerId, :priceMinor, true, 0, :setById)`,
    { offerId: offer.id, priceMinor: offer.priceMinor, setById: by.membershipId },
    tx,
  );
}

async function writeGroup(
  shelf: Supplier,
  group: ShelfGroup,
  found: Offer | null,
  by: By,
  tx: Tx,
): Promise<{ offer: Offer; before: ReturnType<typeof offerFields> | null; changed: boolean }> {
  const terms = offerTerms(group);
  if (!found) {
    const offer = await Offer.create(
      { clubId: shelf.clubId, supplierId: shelf.id, ...terms },
      { transaction: tx.transaction },
    );
    await keepPrice(offer, by, tx);
    return { offer, before: null, changed: true };
  }
  const before = found.archivedAt === null ? offerFields(found) : null;
  const priced = found.priceMinor !== terms.priceMinor;
  const changed = before === null || priced || found.stockPacks !== terms.stockPacks;
  if (changed) {
    found.set({ ...terms, archivedAt: null, version: found.version + 1 });
    await found.save({ transaction: tx.transaction });
    if (priced) await keepPrice(found, by, tx);
  }
  return { offer: found, before, changed };
}

/**
 * Makes the club's shelf, as a supplier of buys, follow its stock: one offer for each salt and price, of whole packs.
 * Open buys that draw on it are told of new prices; what a sale takes from the stock only moves their plan. Called in the
 * transaction of whatever changed stock or price, after it.
 */
export async function syncShelfSupplier(club: ActorClub, by: By, tx: Tx): Promise<void> {
  const needed = (await shelfGroups(club.id, tx)).length > 0;
  const shelf = await lockShelf(club, needed, by, tx);
  if (!shelf) return;
  // Again under the lock: another lot may have changed meanwhile.
  const groups = await shelfGroups(club.id, tx);
  const offers = await Offer.findAll({
    where: { supplierId: shelf.id },
    order: [
      ['updatedAt', 'DESC'],
      ['id', 'ASC'],
    ],
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  const { matched, rest } = matchOffers(groups, offers);
  const salts = await saltsByIds(
    club.id,
    [...new Set([...groups, ...rest].map(({ saltId }) => saltId))],
    tx,
  );
  const namesOf = (saltId: string) => ({
    salt: salts.get(saltId)?.name ?? saltId,
    supplier: shelf.name,
  });
  const changes: OfferChanged[] = [];
  for (const [group, found] of matched) {
    const { offer, before, changed } = await writeGroup(shelf, group, found, by, tx);
    if (!changed) continue;
    const quiet = before !== null && before.priceMinor === offer.priceMinor;
    const said = describeOfferChange(before, offerFields(offer), namesOf(group.saltId), club);
    for (const summary of said)
      changes.push({ supplierId: shelf.id, offerId: offer.id, summary, quiet });
  }
  for (const offer of rest) {
    const [summary = ''] = describeOfferChange(
      offerFields(offer),
      null,
      namesOf(offer.saltId),
      club,
    );
    offer.set({ archivedAt: new Date(), stockPacks: 0, version: offer.version + 1 });
    await offer.save({ transaction: tx.transaction });
    changes.push({ supplierId: shelf.id, offerId: offer.id, summary });
  }
  await offersChanged(tx, changes, by);
}
