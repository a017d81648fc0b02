import type { BuyStanding, ClubStanding } from './actor.ts';

/** One's own portions, slot and pass: whoever takes part, also after leaving. */
export const canReadOwnPickup = (_actor: BuyStanding) => true;

/** Choosing one's slot and who may collect: whoever takes part. */
export const canChangeOwnPickup = (actor: BuyStanding) => actor.buy.takesPart;

/** The desk: organisers of the buy, helpers while their day lasts, treasurers for what is paid. */
export const canReadDesk = (actor: BuyStanding) =>
  actor.buy.organises || actor.buy.helps || (actor.status === 'active' && actor.roles.treasurer);

/** Handing over, and taking it back: organisers and helpers. */
export const canHandOver = (actor: BuyStanding) => actor.buy.organises || actor.buy.helps;

/** Slots, notices, reminders and putting away what nobody fetched: organisers of this buy. */
export const canRunPickup = (actor: BuyStanding) => actor.buy.organises;

/** Sums of others at the desk: organisers of this buy and treasurers; helpers see paid or not paid. */
export const canSeeOwed = (actor: BuyStanding) =>
  actor.buy.organises || (actor.status === 'active' && actor.roles.treasurer);

/** Records of reportable salts of one buy: its responsible organiser and stewards. */
export const canReadRecords = (actor: BuyStanding) =>
  actor.status === 'active' &&
  (actor.buy.responsibleId === actor.membershipId || actor.roles.steward);

/** All records of reportable salts of the club: stewards. */
export const canReadAllRecords = (actor: ClubStanding) =>
  actor.status === 'active' && actor.roles.steward;

/** What lies on the shelf: every member. */
export const canReadShelf = (actor: ClubStanding) => actor.status === 'active';

/** Prices of what lies on the shelf: organisers. */
export const canPriceShelf = (actor: ClubStanding) =>
  actor.status === 'active' && actor.roles.organiser;

/** Selling from the shelf at the meetup: organisers, and whoever helps at a buy today. */
export const canSellFromShelf = (actor: ClubStanding, helpsToday: boolean) =>
  actor.status === 'active' && (actor.roles.organiser || helpsToday);
