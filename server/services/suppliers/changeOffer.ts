import type { Offer as OfferReply, OfferBody } from '#shared/schemas/suppliers.ts';
import { execute, select, transact, type Tx } from '../../config/database.ts';
import { Offer } from '../../models/Offer.ts';
import type { Supplier } from '../../models/Supplier.ts';
import { offerFields } from '../../presenters/suppliers.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { offersChanged, type OfferChanged } from '../buys/offersChanged.ts';
import { byActor } from '../buys/withBuy.ts';
import { invalid, notFound, stale, wrongState } from '../problem.ts';
import { findSalt } from '../salts/saltsOfClub.ts';
import { lockSellingSupplier } from './changeSupplier.ts';
import { describeOfferChange } from './offerWords.ts';
import { getOffer } from './readSuppliers.ts';

/**
 * Refuses a second offer of the same salt, pack and label at a supplier whose row is locked.
 * @throws DomainProblem 422 at `label`
 */
async function refuseTwice(supplier: Supplier, body: OfferBody, self: string | null, tx: Tx) {
  const [twin] = await select<{ id: string }>(
    `select id from offers where supplier_id = :supplierId and archived_at is null and salt_id = :saltId
       and pack_mg = :packMg and lower(label) = lower(:label) and id is distinct from :self limit 1`,
    {
      supplierId: supplier.id,
      saltId: body.saltId,
      packMg: body.packMg,
      label: body.label,
      self,
    },
    tx,
  );
  if (!twin) return;
  throw invalid({
    label:
      'This supplier already offers this pack. Change that offer, or give this one its own label.',
  });
}

/** Keeps a price in the offer's history. */
async function keepPrice(offer: Offer, actor: ClubActor, tx: Tx): Promise<void> {
  await execute(
    `insert into offer_prices (offer_id, price_minor, price_includes_tax, tax_rate_ppm, set_by_id)
     values (:offerId, :priceMinor, :priceIncludesTax, :taxRatePpm, :setById)`,
    {
      offerId: offer.id,
      priceMinor: offer.priceMinor,
      priceIncludesTax: offer.priceIncludesTax,
      taxRatePpm: offer.taxRatePpm,
      setById: actor.membershipId,
    },
    tx,
  );
}

async function saltName(actor: ClubActor, saltId: string, tx: Tx): Promise<string> {
  const salt = await findSalt(actor.club.id, saltId, tx);
  if (!salt) throw invalid({ saltId: 'Choose a salt of your club’s list.' });
  return salt.name;
}

function told(supplier: Supplier, offerId: string, said: readonly string[]): OfferChanged[] {
  return said.map((summary) => ({ supplierId: supplier.id, offerId, summary }));
}

/**
 * Writes a new offer of a locked supplier, its first price and the audit line.
 * @returns what open buys have to be told
 * @throws DomainProblem 422 by field
 */
export async function insertOffer(
  actor: ClubActor,
  supplier: Supplier,
  body: OfferBody,
  tx: Tx,
): Promise<{ id: string; changes: OfferChanged[] }> {
  const salt = await saltName(actor, body.saltId, tx);
  await refuseTwice(supplier, body, null, tx);
  const offer = await Offer.create(
    { clubId: actor.club.id, supplierId: supplier.id, ...body },
    { transaction: tx.transaction },
  );
  await keepPrice(offer, actor, tx);
  await writeAudit(tx, {
    clubId: actor.club.id,
    by: byActor(actor),
    action: 'offers.add',
    subject: { type: 'offer', id: offer.id },
    after: { ...body, supplier: supplier.name, salt },
  });
  const said = describeOfferChange(null, body, { salt, supplier: supplier.name }, actor.club);
  return { id: offer.id, changes: told(supplier, offer.id, said) };
}

/**
 * Writes changes of a locked offer, a changed price and the audit line; nothing when nothing changed.
 * @returns what open buys have to be told
 * @throws DomainProblem 422 by field
 */
export async function writeOffer(
  actor: ClubActor,
  supplier: Supplier,
  offer: Offer,
  body: OfferBody,
  tx: Tx,
): Promise<OfferChanged[]> {
  if (body.saltId !== offer.saltId) {
    throw invalid({ saltId: 'An offer stays with its salt. Archive it and add another.' });
  }
  const before = offerFields(offer);
  const keys = (Object.keys(body) as (keyof OfferBody)[]).filter(
    (key) => before[key] !== body[key],
  );
  if (keys.length === 0) return [];
  await refuseTwice(supplier, body, offer.id, tx);
  const salt = await saltName(actor, body.saltId, tx);
  offer.set({ ...body, version: offer.version + 1 });
  await offer.save({ transaction: tx.transaction });
  const priceKeys: (keyof OfferBody)[] = ['priceMinor', 'priceIncludesTax', 'taxRatePpm'];
  if (keys.some((key) => priceKeys.includes(key))) await keepPrice(offer, actor, tx);
  await writeAudit(tx, {
    clubId: actor.club.id,
    by: byActor(actor),
    action: 'offers.change',
    subject: { type: 'offer', id: offer.id },
    before: Object.fromEntries(keys.map((key) => [key, before[key]])),
    after: Object.fromEntries(keys.map((key) => [key, body[key]])),
  });
  const said = describeOfferChange(before, body, { salt, supplier: supplier.name }, actor.club);
  return told(supplier, offer.id, said);
}

/**
 * Adds an offer to a supplier; open buys that take any offer of it are told.
 * @throws DomainProblem 404; 403 for the shelf; 409 for an archived supplier; 422 by field
 */
export async function addOffer(
  actor: ClubActor,
  supplierId: string,
  body: OfferBody,
): Promise<OfferReply> {
  return transact(async (tx) => {
    const supplier = await lockSellingSupplier(actor, supplierId, tx);
    const { id, changes } = await insertOffer(actor, supplier, body, tx);
    await offersChanged(tx, changes, byActor(actor));
    return getOffer(actor.club.id, supplierId, id, tx);
  });
}

async function lockOffer(supplier: Supplier, id: string, version: number, tx: Tx): Promise<Offer> {
  const offer = await Offer.lock(supplier.id, id, tx);
  if (!offer) throw notFound('This offer');
  if (offer.version !== version) {
    throw stale(
      'Someone changed this offer since you opened it.',
      await getOffer(supplier.clubId, supplier.id, id, tx),
    );
  }
  return offer;
}

/**
 * Changes an offer; its old price stays in its history, open buys that draw on it are told.
 * @throws DomainProblem 404; 403 for the shelf; 409 `stale`; 422 by field
 */
export async function changeOffer(
  actor: ClubActor,
  supplierId: string,
  id: string,
  version: number,
  body: OfferBody,
): Promise<OfferReply> {
  return transact(async (tx) => {
    const supplier = await lockSellingSupplier(actor, supplierId, tx);
    const offer = await lockOffer(supplier, id, version, tx);
    if (offer.archivedAt) throw wrongState('This offer is archived. Bring it back first.');
    const changes = await writeOffer(actor, supplier, offer, body, tx);
    await offersChanged(tx, changes, byActor(actor));
    return getOffer(actor.club.id, supplierId, id, tx);
  });
}

/**
 * Archives an offer, or brings it back; open buys that draw on it are told.
 * @throws DomainProblem 404; 403 for the shelf; 409 `stale`; 422 when the same pack is offered again meanwhile
 */
export async function archiveOffer(
  actor: ClubActor,
  supplierId: string,
  id: string,
  version: number,
  archived: boolean,
): Promise<OfferReply> {
  return transact(async (tx) => {
    const supplier = await lockSellingSupplier(actor, supplierId, tx);
    const offer = await lockOffer(supplier, id, version, tx);
    if ((offer.archivedAt !== null) !== archived) {
      const fields = offerFields(offer);
      if (!archived) await refuseTwice(supplier, fields, id, tx);
      offer.archivedAt = archived ? new Date() : null;
      offer.version += 1;
      await offer.save({ transaction: tx.transaction });
      const salt = await saltName(actor, offer.saltId, tx);
      await writeAudit(tx, {
        clubId: actor.club.id,
        by: byActor(actor),
        action: archived ? 'offers.archive' : 'offers.restore',
        subject: { type: 'offer', id },
        after: { supplier: supplier.name, salt, packMg: offer.packMg },
      });
      const names = { salt, supplier: supplier.name };
      const said = archived
        ? describeOfferChange(fields, null, names, actor.club)
        : describeOfferChange(null, fields, names, actor.club);
      await offersChanged(tx, told(supplier, id, said), byActor(actor));
    }
    return getOffer(actor.club.id, supplierId, id, tx);
  });
}
