import { select, type Tx } from '../../config/database.ts';
import type { ClubSalt } from '#shared/schemas/salts.ts';
import { DomainProblem, invalid } from '../problem.ts';
import { findSalt } from '../salts/saltsOfClub.ts';

/** What a line is bought from: chosen offers, or any offer of one supplier. */
export interface LineSource {
  offerIds: readonly string[];
  anyOfSupplierId: string | null;
}

/**
 * The salt for a new line.
 * @throws DomainProblem 422 `not_a_line` with the reason, or 422 when the club doesn't list it
 */
export async function getLineSalt(clubId: string, saltId: string, tx: Tx): Promise<ClubSalt> {
  const salt = await findSalt(clubId, saltId, tx);
  if (!salt || salt.hidden || salt.archivedAt)
    throw invalid({ saltId: "This salt isn't on the list of the club." });
  if (salt.lineRefusal !== null) {
    throw new DomainProblem(422, 'not_a_line', salt.lineRefusal, {
      errors: { saltId: salt.lineRefusal },
    });
  }
  return salt;
}

interface OfferRow {
  id: string;
  supplier_id: string;
  pack_mg: number;
  supplier: string;
}

/** Living offers of a salt in a club, smallest pack first. */
export async function findLivingOffers(
  clubId: string,
  saltId: string,
  tx: Tx,
): Promise<OfferRow[]> {
  return select<OfferRow>(
    `select o.id, o.supplier_id, o.pack_mg, s.name as supplier from offers o join suppliers s on s.id = o.supplier_id
     where o.club_id = :clubId and o.salt_id = :saltId and o.archived_at is null and s.archived_at is null
     order by o.pack_mg, o.id`,
    { clubId, saltId },
    tx,
  );
}

/**
 * Checks that a line can draw on these offers. A draft may still be without any; a line of an open buy may not.
 * @throws DomainProblem 422 at `offerIds` or `anyOfSupplierId`
 */
export async function checkLineSource(
  clubId: string,
  saltId: string,
  source: LineSource,
  needsOne: boolean,
  tx: Tx,
): Promise<OfferRow[]> {
  const living = await findLivingOffers(clubId, saltId, tx);
  const { anyOfSupplierId, offerIds } = source;
  if (anyOfSupplierId !== null) {
    if (offerIds.length > 0)
      throw invalid({ offerIds: 'Choose offers, or any offer of one supplier, not both.' });
    const [supplier] = await select<{ id: string }>(
      'select id from suppliers where id = :anyOfSupplierId and club_id = :clubId and archived_at is null',
      { anyOfSupplierId, clubId },
      tx,
    );
    if (!supplier)
      throw invalid({ anyOfSupplierId: "This supplier isn't on the list of the club." });
    const own = living.filter((offer) => offer.supplier_id === anyOfSupplierId);
    if (needsOne && own.length === 0)
      throw invalid({ anyOfSupplierId: 'This supplier has no offer for the salt.' });
    return own;
  }
  const chosen = living.filter(({ id }) => offerIds.includes(id));
  if (chosen.length < new Set(offerIds).size)
    throw invalid({ offerIds: 'One of these offers is no longer there. Choose anew.' });
  if (needsOne && chosen.length === 0) throw invalid({ offerIds: 'Choose at least one offer.' });
  return chosen;
}

/** A pack and whose it is, e.g. "25 kg from Marlbrook Salts". */
export const sayOffer = (offer: OfferRow, pack: (mg: number) => string) =>
  `${pack(offer.pack_mg)} from ${offer.supplier}`;
