import type { BuyStanding, ClubStanding } from './actor.ts';

/** One's own statement: every member, also one who left and still has dues or credit. */
export const canReadOwnStatement = (_actor: ClubStanding) => true;

/** Everybody's dues and payments, the journal, and every act that moves the club's money. */
export const canKeepBooks = (actor: ClubStanding) =>
  actor.status === 'active' && actor.roles.treasurer;

/** Who paid and who owes in a buy. */
export const canSeePaymentsOfBuy = (actor: BuyStanding) =>
  actor.buy.organises || canKeepBooks(actor);

/** Noting cash that was handed over for a buy. */
export const canNoteCash = (actor: BuyStanding) => actor.buy.organises || actor.buy.takesCash;
