import type { UploadOwnerType } from '#shared/schemas/uploads.ts';
import { select, type Tx } from '../../config/database.ts';
import { buyUploads, clubUploads, type BuyOwnerType } from '../../policies/uploads.ts';
import { findBuyActor, type ClubActor } from '../actors.ts';
import { notFound } from '../problem.ts';

/** What an actor may do with the uploads of one thing. */
export interface UploadOwner {
  readonly buyId: string | null;
  readonly mayAdd: boolean;
}

/** Where each owner is found, as an SQL select of its id, and of its buy where it has one. */
const finders: Record<UploadOwnerType, string> = {
  supplier: 'select null as buy_id from suppliers where club_id = :clubId and id = :id',
  offer: 'select null as buy_id from offers where club_id = :clubId and id = :id',
  buy: 'select id as buy_id from buys where club_id = :clubId and id = :id',
  line: 'select buy_id from lines where id = :id',
  bag: 'select buy_id from bags where id = :id',
  bill: 'select buy_id from bills where id = :id',
  supplier_order: 'select buy_id from supplier_orders where id = :id',
};

const isOfClub = (type: UploadOwnerType): type is 'offer' | 'supplier' => type in clubUploads;

/**
 * The thing an upload belongs to, and whether this actor may add to it. The rules stand in policies/uploads.ts.
 * @throws DomainProblem 404 when it isn't there or its uploads are not for this actor
 */
export async function getUploadOwner(
  actor: ClubActor,
  type: UploadOwnerType,
  id: string,
  tx?: Tx,
): Promise<UploadOwner> {
  const [row] = await select<{ buy_id: string | null }>(
    finders[type],
    { clubId: actor.club.id, id },
    tx,
  );
  if (!row) throw notFound('This');
  if (isOfClub(type)) {
    if (!clubUploads[type].see(actor)) throw notFound('This');
    return { buyId: null, mayAdd: clubUploads[type].add(actor) };
  }
  return ownerInBuy(actor, type, row.buy_id ?? '');
}

async function ownerInBuy(
  actor: ClubActor,
  type: BuyOwnerType,
  buyId: string,
): Promise<UploadOwner> {
  // Also refuses another club's buy, and a draft that isn't the actor's.
  const standing = await findBuyActor(actor, buyId);
  if (!standing || !buyUploads[type].see(standing)) throw notFound('This');
  return { buyId, mayAdd: buyUploads[type].add(standing) };
}
