import { z } from 'zod';
import { Id } from '#shared/schemas/fields.ts';
import {
  ChooseSlotBody,
  HandoverBody,
  MyPickup,
  PassBody,
  PassReply,
  PickupDesk,
  PickupNoticeBody,
  PickupSlot,
  ProxyBody,
  SlotBody,
  ToldReply,
} from '#shared/schemas/pickup.ts';
import { LossBody, RecordList } from '#shared/schemas/precursors.ts';
import { PriceBody, SaleBody, Shelf } from '#shared/schemas/shelf.ts';
import { limit } from '../middlewares/limits.ts';
import { buyRoute, clubRoute, type RouteDef } from '../middlewares/route.ts';
import {
  canChangeOwnPickup,
  canHandOver,
  canPriceShelf,
  canReadAllRecords,
  canReadDesk,
  canReadOwnPickup,
  canReadRecords,
  canReadShelf,
  canRunPickup,
} from '../policies/pickup.ts';
import { handOver, undoHandover } from '../services/pickup/handOver.ts';
import { findByPass } from '../services/pickup/passes.ts';
import { priceStock } from '../services/pickup/priceStock.ts';
import { readDesk, readMyPickup } from '../services/pickup/readDesk.ts';
import { readShelf } from '../services/pickup/readShelf.ts';
import { listRecords, recordLoss } from '../services/pickup/records.ts';
import { sellFromShelf } from '../services/pickup/sellFromShelf.ts';
import {
  addSlot,
  changeSlot,
  chooseSlot,
  nameProxy,
  removeSlot,
} from '../services/pickup/slots.ts';
import { tellPickup } from '../services/pickup/tellPickup.ts';
import { putAway, remindOne } from '../services/pickup/unclaimed.ts';
import { undoSale } from '../services/pickup/undoSale.ts';

const Slot = z.object({ slot: Id });
const Member = z.object({ member: Id });
const Handover = z.object({ handover: Id });
const Stock = z.object({ stock: Id });
const Sale = z.object({ sale: Id });
const Slots = z.array(PickupSlot);

// A pass can't be guessed; a device that tries is stopped all the same.
const passTries = limit({
  name: 'pass',
  windowMs: 15 * 60_000,
  max: 60,
  failuresOnly: true,
  key: (req) => req.user?.id ?? req.ip ?? '',
});

const ownPickup: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/pickup/mine',
    summary: 'Own pickup: portions, slot, what is owed, and the pass',
    allow: canReadOwnPickup,
    former: true,
    reply: MyPickup,
    run: ({ actor }) => readMyPickup(actor),
  }),
  buyRoute({
    method: 'put',
    path: '/pickup/mine/slot',
    summary: 'Choose a slot, or none',
    allow: canChangeOwnPickup,
    former: true,
    body: ChooseSlotBody,
    reply: MyPickup,
    run: async ({ actor, body }) => {
      await chooseSlot(actor, body.slotId);
      return readMyPickup(actor);
    },
  }),
  buyRoute({
    method: 'put',
    path: '/pickup/mine/proxy',
    summary: 'Name who may collect instead, or nobody',
    allow: canChangeOwnPickup,
    former: true,
    body: ProxyBody,
    reply: MyPickup,
    run: async ({ actor, body }) => {
      await nameProxy(actor, body.name);
      return readMyPickup(actor);
    },
  }),
];

const desk: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/pickup',
    summary: 'The desk: who collects what, and what stands in the way',
    allow: canReadDesk,
    reply: PickupDesk,
    run: ({ actor }) => readDesk(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/pickup/pass',
    summary: 'Whose pass this is',
    before: [passTries],
    allow: canHandOver,
    body: PassBody,
    reply: PassReply,
    run: async ({ actor, body }) => ({ membershipId: await findByPass(actor.buy.id, body.pass) }),
  }),
  buyRoute({
    method: 'post',
    path: '/handovers',
    summary: 'Hand portions over',
    allow: canHandOver,
    body: HandoverBody,
    reply: PickupDesk,
    run: ({ actor, body }) => handOver(actor, body),
  }),
  buyRoute({
    method: 'delete',
    path: '/handovers/:handover',
    summary: 'Take a hand-over back',
    allow: canHandOver,
    params: Handover,
    reply: PickupDesk,
    run: ({ actor, params }) => undoHandover(actor, params.handover),
  }),
];

const running: RouteDef[] = [
  buyRoute({
    method: 'post',
    path: '/pickup/slots',
    summary: 'Add a time of hand-over',
    status: 201,
    allow: canRunPickup,
    body: SlotBody,
    reply: Slots,
    run: ({ actor, body }) => addSlot(actor, body),
  }),
  buyRoute({
    method: 'put',
    path: '/pickup/slots/:slot',
    summary: 'Change a time of hand-over',
    allow: canRunPickup,
    params: Slot,
    body: SlotBody,
    reply: Slots,
    run: ({ actor, params, body }) => changeSlot(actor, params.slot, body),
  }),
  buyRoute({
    method: 'delete',
    path: '/pickup/slots/:slot',
    summary: 'Remove a time of hand-over',
    allow: canRunPickup,
    params: Slot,
    reply: Slots,
    run: ({ actor, params }) => removeSlot(actor, params.slot),
  }),
  buyRoute({
    method: 'post',
    path: '/pickup/notices',
    summary: 'Tell members that their share waits, with slot, place, pass and calendar entry',
    allow: canRunPickup,
    body: PickupNoticeBody,
    reply: ToldReply,
    run: ({ actor, body }) => tellPickup(actor, body),
  }),
  buyRoute({
    method: 'post',
    path: '/pickup/members/:member/reminders',
    summary: 'Remind one member of what waits',
    allow: canRunPickup,
    params: Member,
    reply: PickupDesk,
    run: ({ actor, params }) => remindOne(actor, params.member),
  }),
  buyRoute({
    method: 'post',
    path: '/pickup/members/:member/unclaimed',
    summary: 'Put on the shelf what was not collected in time',
    allow: canRunPickup,
    params: Member,
    reply: PickupDesk,
    run: ({ actor, params }) => putAway(actor, params.member),
  }),
];

const records: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/precursors',
    summary: 'Who received reportable salts of this buy',
    allow: canReadRecords,
    reply: RecordList,
    run: ({ actor }) => listRecords(actor, actor.buy.id),
  }),
  buyRoute({
    method: 'post',
    path: '/precursors/losses',
    summary: 'Write down a loss or theft of a reportable salt',
    status: 201,
    allow: canReadRecords,
    body: LossBody,
    reply: RecordList,
    run: ({ actor, body }) => recordLoss(actor, body),
  }),
  clubRoute({
    method: 'get',
    path: '/precursors',
    summary: 'Who received reportable salts in this club',
    allow: canReadAllRecords,
    reply: RecordList,
    run: ({ actor }) => listRecords(actor),
  }),
];

const shelf: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/shelf',
    summary: 'What lies on the club’s shelf',
    allow: canReadShelf,
    reply: Shelf,
    run: ({ actor }) => readShelf(actor),
  }),
  clubRoute({
    method: 'put',
    path: '/shelf/:stock',
    summary: 'Set the price of a lot',
    allow: canPriceShelf,
    params: Stock,
    body: PriceBody,
    reply: Shelf,
    run: ({ actor, params, body }) => priceStock(actor, params.stock, body),
  }),
  clubRoute({
    method: 'post',
    path: '/shelf/:stock/sales',
    summary: 'Sell some of a lot (organisers, and who helps at a buy today)',
    allow: canReadShelf,
    params: Stock,
    body: SaleBody,
    reply: Shelf,
    run: ({ actor, params, body }) => sellFromShelf(actor, params.stock, body),
  }),
  clubRoute({
    method: 'delete',
    path: '/shelf/sales/:sale',
    summary: 'Take a sale back',
    allow: canReadShelf,
    params: Sale,
    reply: Shelf,
    run: ({ actor, params }) => undoSale(actor, params.sale),
  }),
];

export const pickupRoutes: RouteDef[] = [...ownPickup, ...desk, ...running, ...records, ...shelf];
