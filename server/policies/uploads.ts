import type { UploadOwnerType } from '#shared/schemas/uploads.ts';
import type { BuyStanding, ClubStanding } from './actor.ts';
import { canEditSuppliers, canReadSalts } from './salts.ts';

/** Owners of uploads outside a buy. */
export type ClubOwnerType = Extract<UploadOwnerType, 'offer' | 'supplier'>;
/** Owners of uploads that belong to a buy. */
export type BuyOwnerType = Exclude<UploadOwnerType, ClubOwnerType>;

type Rule<Actor> = { see: (actor: Actor) => boolean; add: (actor: Actor) => boolean };

/** Price lists and certificates of suppliers and offers. */
export const clubUploads: Record<ClubOwnerType, Rule<ClubStanding>> = {
  supplier: { see: canReadSalts, add: canEditSuppliers },
  offer: { see: canReadSalts, add: canEditSuppliers },
};

const seesBuy = () => true;
const organises = (actor: BuyStanding) => actor.buy.organises;
const seesMoney = (actor: BuyStanding) => organises(actor) || actor.roles.treasurer;

/** Photos and certificates are for all who see the buy; bills and orders for its organisers and the treasurers. */
export const buyUploads: Record<BuyOwnerType, Rule<BuyStanding>> = {
  buy: { see: seesBuy, add: organises },
  line: { see: seesBuy, add: organises },
  bag: { see: seesBuy, add: (actor) => organises(actor) || actor.buy.helps },
  bill: { see: seesMoney, add: seesMoney },
  supplier_order: { see: seesMoney, add: organises },
};

/** Asking for a list of uploads: what of it is shown depends on its owner. */
export const canAskForUploads = (_actor: ClubStanding) => true;
