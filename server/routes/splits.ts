import { z } from 'zod';
import { BuyHeader } from '#shared/schemas/buys.ts';
import { Id } from '#shared/schemas/fields.ts';
import {
  ApplyTargetsBody,
  ArrivalBody,
  BagBody,
  ClaimBody,
  CloseBagBody,
  CutBody,
  ExcessBody,
  FinalPreview,
  FinishBody,
  LineNoteBody,
  MyShare,
  PortionVersion,
  SpillBody,
  SplitChange,
  SplitSheet,
  TargetsPreview,
  TermsSeen,
  VoidBody,
  WeighingBody,
} from '#shared/schemas/splits.ts';
import { buyRoute, type RouteDef } from '../middlewares/route.ts';
import {
  canPreviewFinal,
  canReadSplit,
  canRunSplit,
  canTakeLoss,
  canWeigh,
} from '../policies/splits.ts';
import { readBuyHeaderAgain } from '../services/buys/readBuys.ts';
import { applyTargets } from '../services/splits/applyTargets.ts';
import { claimPortion, releasePortion } from '../services/splits/claimPortion.ts';
import { closeBag, noteLine, reopenBag } from '../services/splits/closeBag.ts';
import { countBag } from '../services/splits/countBag.ts';
import { cutIntoParts, joinParts } from '../services/splits/cutPortion.ts';
import { finishSplitting } from '../services/splits/finishSplitting.ts';
import { keepWeighing } from '../services/splits/keepWeighing.ts';
import { markArrived } from '../services/splits/markArrived.ts';
import { noteSpill, undoSpill } from '../services/splits/noteSpill.ts';
import { previewFinal } from '../services/splits/previewFinal.ts';
import { previewTargets } from '../services/splits/previewTargets.ts';
import { readMyShare } from '../services/splits/readMyShare.ts';
import { readSplit } from '../services/splits/readSplit.ts';
import { recordArrival } from '../services/splits/recordArrival.ts';
import { startSplitting } from '../services/splits/startSplitting.ts';
import { takeExcess } from '../services/splits/takeExcess.ts';
import { undoWeighing } from '../services/splits/undoWeighing.ts';
import { restorePortion, voidPortion } from '../services/splits/voidPortion.ts';

const Bag = z.object({ bag: Id });
const Portion = z.object({ portion: Id });

const reading: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/split',
    summary: 'Bags, portions and progress of the split',
    former: true,
    reply: SplitSheet,
    allow: canReadSplit,
    run: ({ actor }) => readSplit(actor),
  }),
  buyRoute({
    method: 'get',
    path: '/share',
    summary: "One's own share: target, weighed, final, with its arithmetic",
    former: true,
    reply: MyShare,
    allow: canReadSplit,
    run: ({ actor }) => readMyShare(actor),
  }),
];

const arriving: RouteDef[] = [
  buyRoute({
    method: 'post',
    path: '/orders/:supplier/arrival',
    summary: "A supplier's order has come: how many packs of each offer",
    params: z.object({ supplier: Id }),
    body: ArrivalBody,
    reply: SplitChange,
    allow: canRunSplit,
    run: ({ actor, params, body }) => recordArrival(actor, params.supplier, body),
  }),
  buyRoute({
    method: 'put',
    path: '/bags/:bag',
    summary: 'Count and weigh a bag',
    params: Bag,
    body: BagBody,
    reply: SplitChange,
    allow: canRunSplit,
    run: ({ actor, params, body }) => countBag(actor, params.bag, body),
  }),
  buyRoute({
    method: 'post',
    path: '/arrive',
    summary: 'All orders are in: move the buy to arrived',
    body: TermsSeen,
    reply: BuyHeader,
    allow: canRunSplit,
    run: async ({ actor, body }) => {
      await markArrived(actor, body.termsVersion);
      return readBuyHeaderAgain(actor, actor.buy.id);
    },
  }),
  buyRoute({
    method: 'get',
    path: '/targets',
    summary: 'The targets that the bags would give, beside the estimate',
    reply: TargetsPreview,
    allow: canRunSplit,
    run: ({ actor }) => previewTargets(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/targets',
    summary: 'Make the previewed targets count',
    body: ApplyTargetsBody,
    reply: BuyHeader,
    allow: canRunSplit,
    run: async ({ actor, body }) => {
      await applyTargets(actor, body);
      return readBuyHeaderAgain(actor, actor.buy.id);
    },
  }),
  buyRoute({
    method: 'post',
    path: '/start-splitting',
    summary: 'Begin the split',
    body: TermsSeen,
    reply: BuyHeader,
    allow: canRunSplit,
    run: async ({ actor, body }) => {
      await startSplitting(actor, body.termsVersion);
      return readBuyHeaderAgain(actor, actor.buy.id);
    },
  }),
];

const weighing: RouteDef[] = [
  buyRoute({
    method: 'post',
    path: '/portions/:portion/claim',
    summary: 'Take a portion to weigh it',
    params: Portion,
    body: ClaimBody,
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, params, body }) => claimPortion(actor, params.portion, body),
  }),
  buyRoute({
    method: 'post',
    path: '/portions/:portion/release',
    summary: 'Give a claimed portion back',
    params: Portion,
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, params }) => releasePortion(actor, params.portion),
  }),
  buyRoute({
    method: 'post',
    path: '/portions/:portion/cut',
    summary: 'Cut a portion into parts that a scale can carry or a bag can give',
    params: Portion,
    body: CutBody,
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, params, body }) => cutIntoParts(actor, params.portion, body),
  }),
  buyRoute({
    method: 'post',
    path: '/portions/:portion/join',
    summary: 'Put the parts that are not weighed yet together again',
    params: Portion,
    body: PortionVersion,
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, params, body }) => joinParts(actor, params.portion, body.version),
  }),
  buyRoute({
    method: 'post',
    path: '/portions/:portion/void',
    summary: 'Take a portion out, with a reason',
    params: Portion,
    body: VoidBody,
    reply: SplitChange,
    allow: canRunSplit,
    run: ({ actor, params, body }) => voidPortion(actor, params.portion, body),
  }),
  buyRoute({
    method: 'post',
    path: '/portions/:portion/restore',
    summary: 'Put a portion back that was taken out',
    params: Portion,
    body: PortionVersion,
    reply: SplitChange,
    allow: canRunSplit,
    run: ({ actor, params, body }) => restorePortion(actor, params.portion, body.version),
  }),
  buyRoute({
    method: 'post',
    path: '/weighings',
    summary: 'Keep a weighing, once for its id',
    body: WeighingBody,
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, body }) => keepWeighing(actor, body),
  }),
  buyRoute({
    method: 'post',
    path: '/weighings/:weighing/undo',
    summary: 'Take a weighing back',
    params: z.object({ weighing: Id }),
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, params }) => undoWeighing(actor, params.weighing),
  }),
  buyRoute({
    method: 'post',
    path: '/bags/:bag/spills',
    summary: 'Note what was spilled from a bag, once for its id',
    params: Bag,
    body: SpillBody,
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, params, body }) => noteSpill(actor, params.bag, body),
  }),
  buyRoute({
    method: 'post',
    path: '/spills/:spill/undo',
    summary: 'Take a note of a spill back',
    params: z.object({ spill: Id }),
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, params }) => undoSpill(actor, params.spill),
  }),
  buyRoute({
    method: 'post',
    path: '/bags/:bag/close',
    summary: 'Close a bag: what is left in it goes to the shelf',
    params: Bag,
    body: CloseBagBody,
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, params, body }) => closeBag(actor, params.bag, body),
  }),
  buyRoute({
    method: 'post',
    path: '/bags/:bag/reopen',
    summary: 'Open a closed bag again',
    params: Bag,
    body: PortionVersion,
    reply: SplitChange,
    allow: canWeigh,
    run: ({ actor, params, body }) => reopenBag(actor, params.bag, body.version),
  }),
];

const finishing: RouteDef[] = [
  buyRoute({
    method: 'put',
    path: '/lines/:line/unaccounted-note',
    summary: 'Say why more than 1 % of a line is unaccounted for',
    params: z.object({ line: Id }),
    body: LineNoteBody,
    reply: SplitChange,
    allow: canRunSplit,
    run: ({ actor, params, body }) => noteLine(actor, params.line, body),
  }),
  buyRoute({
    method: 'put',
    path: '/excess-loss',
    summary: 'Whether the club bears what was lost above 2 % of a line',
    body: ExcessBody,
    reply: BuyHeader,
    allow: canTakeLoss,
    run: async ({ actor, body }) => {
      await takeExcess(actor, body);
      return readBuyHeaderAgain(actor, actor.buy.id);
    },
  }),
  buyRoute({
    method: 'get',
    path: '/final',
    summary: 'The final shares as they would be posted now',
    reply: FinalPreview,
    allow: canPreviewFinal,
    run: ({ actor }) => previewFinal(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/finish-splitting',
    summary: 'End the split: post the final shares, open the pickup',
    body: FinishBody,
    reply: BuyHeader,
    allow: canRunSplit,
    run: async ({ actor, body }) => {
      await finishSplitting(actor, body);
      return readBuyHeaderAgain(actor, actor.buy.id);
    },
  }),
];

/** From the packs that came to the final share. */
export const splitsRoutes: RouteDef[] = [...reading, ...arriving, ...weighing, ...finishing];
