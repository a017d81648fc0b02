import type { BuyStanding } from './actor.ts';

/** Bags, portions and progress, and one's own share: whoever can see the buy, also former members who take part. */
export const canReadSplit = (_actor: BuyStanding) => true;

/** Counting and weighing the bags that came, targets, moving the split on: the organisers of this buy. */
export const canRunSplit = (actor: BuyStanding) => actor.buy.organises;

/** Claiming, cutting and weighing portions, spills, closing bags: organisers, and helpers while their day lasts. */
export const canWeigh = (actor: BuyStanding) => actor.buy.organises || actor.buy.helps;

/** Everyone's final share before it is posted: organisers of the buy and treasurers. */
export const canPreviewFinal = (actor: BuyStanding) => actor.buy.organises || canTakeLoss(actor);

/** Whether the club bears what was lost above 2 %: treasurers. */
export const canTakeLoss = (actor: BuyStanding) =>
  actor.status === 'active' && actor.roles.treasurer;

/** Others' grams of a salt that the club shows most members only in total: whoever weighs, and stewards. */
export const canSeeHiddenGrams = (actor: BuyStanding) =>
  canWeigh(actor) || (actor.status === 'active' && actor.roles.steward);
