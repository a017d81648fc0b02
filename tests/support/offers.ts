import { select } from '#server/config/database.ts';
import type { Club } from '#server/models/Club.ts';

/** A supplier with flat shipping; gives its id. */
export async function makeSupplier(club: Club, name: string, shippingMinor = 0): Promise<string> {
  const [row] = await select<{ id: string }>(
    'insert into suppliers (club_id, name, shipping) values (:clubId, :name, :shipping) returning id',
    {
      clubId: club.id,
      name,
      shipping: JSON.stringify({ kind: 'flat', minor: shippingMinor }),
    },
  );
  if (!row) throw new Error('no supplier');
  return row.id;
}

/** A pack of a salt at a price, tax included. */
export async function makeOffer(
  supplierId: string,
  saltId: string,
  packMg: number,
  priceMinor: number,
): Promise<{ id: string }> {
  const [row] = await select<{ id: string }>(
    `insert into offers (club_id, supplier_id, salt_id, pack_mg, price_minor)
     select club_id, id, :saltId, :packMg, :priceMinor from suppliers where id = :supplierId returning id`,
    { supplierId, saltId, packMg, priceMinor },
  );
  if (!row) throw new Error('no offer');
  return row;
}
