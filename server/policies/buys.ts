import type { BuyStanding, ClubStanding } from './actor.ts';

/** Reading the list of buys, also former members; which of them is decided by who takes part and who organises. */
export const canListBuys = (_actor: ClubStanding) => true;

/** Reading one buy: whoever can see it at all, also former members who take part. */
export const canReadBuy = (_actor: BuyStanding) => true;

/** Drafting a new buy, or copying an earlier one. */
export const canDraftBuy = (actor: ClubStanding) =>
  actor.status === 'active' && actor.roles.organiser;

/** Drafting a new buy after this one. */
export const canCopyBuy = (actor: BuyStanding) => canDraftBuy(actor);

/** Lines, offers, charges, policies, dates, people, opening and cancelling: the organisers of this buy. */
export const canOrganiseBuy = (actor: BuyStanding) => actor.buy.organises;

/** Offering responsibility to another organiser: only who carries it. */
export const canOfferResponsibility = (actor: BuyStanding) =>
  actor.buy.organises && actor.buy.responsibleId === actor.membershipId;

/** Answering an offer of responsibility: organisers; whether it was made to this one is checked under the lock. */
export const canAnswerResponsibility = (actor: BuyStanding) =>
  actor.status === 'active' && actor.roles.organiser;

/** Passing responsibility when its holder can't act. */
export const canPassResponsibility = (actor: BuyStanding) =>
  actor.status === 'active' && actor.roles.steward;

/** Handing on one's own line: whoever takes part, also after leaving the club. */
export const canHandOn = (actor: BuyStanding) => actor.buy.takesPart;

/** Answering a hand-on that was offered: any member. */
export const canAnswerHandOn = (actor: BuyStanding) => actor.status === 'active';
