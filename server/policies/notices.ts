import type { BuyStanding, ClubStanding } from './actor.ts';

/** One's own notices and what of them comes by mail, also after leaving. */
export const canReadOwnNotices = (_actor: ClubStanding) => true;

/** What was delivered about a buy: its organisers, and the treasurer for what tells of payments. */
export const canReadDeliveries = (actor: BuyStanding) =>
  actor.buy.organises || (actor.status === 'active' && actor.roles.treasurer);

/** Writing to the people of a buy: its organisers. */
export const canSendNotices = (actor: BuyStanding) => actor.buy.organises;
