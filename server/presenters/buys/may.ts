import type { BuyState } from '#shared/domain/buys/states.ts';
import type { BuyMay } from '#shared/schemas/buyMay.ts';
import type { BuyStanding } from '../../policies/actor.ts';
import * as buys from '../../policies/buys.ts';
import * as ledger from '../../policies/ledger.ts';
import * as notices from '../../policies/notices.ts';
import * as orders from '../../policies/orders.ts';
import * as pickup from '../../policies/pickup.ts';
import * as splits from '../../policies/splits.ts';

/** Facts of the buy that an act depends on besides its state. */
export interface MayFacts {
  readonly state: BuyState;
  readonly offeredToId: string | null;
  readonly frozen: boolean;
  readonly opened: boolean;
}

const live: readonly BuyState[] = [
  'draft',
  'open',
  'locked',
  'ordered',
  'arrived',
  'splitting',
  'pickup',
];

/** What this viewer may do with the buy now; the client shows an act exactly when its key is true. */
export function mayWithBuy(actor: BuyStanding, facts: MayFacts): BuyMay {
  const { state } = facts;
  const organises = buys.canOrganiseBuy(actor);
  const isIn = (...states: BuyState[]) => states.includes(state);
  return {
    edit: organises && isIn('draft', 'open'),
    editMeeting: organises && live.includes(state),
    open: organises && isIn('draft'),
    discard: organises && isIn('draft'),
    cancel: organises && isIn('open', 'locked'),
    restore: organises && isIn('cancelled') && !facts.opened,
    copy: buys.canCopyBuy(actor),
    namePeople: organises && live.includes(state),
    offerResponsibility: buys.canOfferResponsibility(actor) && live.includes(state),
    answerResponsibility:
      buys.canAnswerResponsibility(actor) && facts.offeredToId === actor.membershipId,
    passResponsibility: buys.canPassResponsibility(actor) && live.includes(state),
    countBags: splits.canRunSplit(actor) && isIn('locked', 'ordered', 'arrived', 'splitting'),
    weigh: splits.canWeigh(actor) && isIn('splitting'),
    runSplit: splits.canRunSplit(actor) && isIn('ordered', 'arrived', 'splitting'),
    takeLoss: splits.canTakeLoss(actor) && isIn('arrived', 'splitting'),
    seeDesk: pickup.canReadDesk(actor) && isIn('splitting', 'pickup', 'settled'),
    handOver: pickup.canHandOver(actor) && isIn('pickup'),
    runPickup:
      pickup.canRunPickup(actor) && isIn('locked', 'ordered', 'arrived', 'splitting', 'pickup'),
    seeRecords: pickup.canReadRecords(actor) && isIn('arrived', 'splitting', 'pickup', 'settled'),
    seeNotices: notices.canReadDeliveries(actor) && facts.opened,
    writeNotices: notices.canSendNotices(actor) && facts.opened,
    seePayments: ledger.canSeePaymentsOfBuy(actor) && facts.opened,
    order: orders.canOrder(actor) && isIn('locked', 'ordered', 'arrived', 'splitting', 'pickup'),
    settle: orders.canCloseBuy(actor) && isIn('pickup'),
    handOn: buys.canHandOn(actor) && isIn('locked', 'ordered', 'arrived', 'splitting', 'pickup'),
  };
}
