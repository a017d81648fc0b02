import type { BuyStanding } from './actor.ts';

const isTreasurer = (actor: BuyStanding) => actor.status === 'active' && actor.roles.treasurer;

/** Reading orders, shares and one's own dues: whoever sees the buy, also former members who take part. */
export const canReadOrders = (_actor: BuyStanding) => true;

/** Quoting, placing, marking and dropping: the organisers of this buy. */
export const canOrder = (actor: BuyStanding) => actor.buy.organises;

/** Order sheets, bills and others' payments: organisers of this buy, and treasurers. */
export const canSeeMoneyOfBuy = (actor: BuyStanding) => actor.buy.organises || isTreasurer(actor);

/** Answering with one's name for a member who hasn't paid. */
export const canVouch = canSeeMoneyOfBuy;

/** Reminding of dues by hand. */
export const canRemind = canSeeMoneyOfBuy;

/** Agreeing to a share past the price limit, or leaving: who takes part. */
export const canAnswerPrice = (actor: BuyStanding) => actor.buy.takesPart;

/** Typing bills off the paper. */
export const canEnterBills = (actor: BuyStanding) => actor.buy.organises;

/** Confirming and reversing bills, supplier refunds, losses, and closing the buy. */
export const canCloseBuy = (actor: BuyStanding) => isTreasurer(actor);
