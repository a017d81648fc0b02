import type { BuyStanding } from './actor.ts';

/** Reading the sheet, its changes and one's own part: whoever can see the buy, also former members who take part. */
export const canReadSheet = (_actor: BuyStanding) => true;

/** Pledging for oneself, confirming cautions and answering an organiser's question: members of today. */
export const canPledge = (actor: BuyStanding) => actor.status === 'active';

/** Pledging for others, guests' papers, packs, lock, reopening and extending: the organisers of this buy. */
export const canRunSheet = (actor: BuyStanding) => actor.buy.organises;

/** Seeing single pledges where the club shows most members only the total of a reportable salt. */
export const canSeeHiddenGrams = (actor: BuyStanding) =>
  actor.buy.organises || (actor.status === 'active' && actor.roles.steward);
