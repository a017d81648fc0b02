import { z } from 'zod';
import { BuyHeader } from '#shared/schemas/buys.ts';
import { Done, Id, Version } from '#shared/schemas/fields.ts';
import {
  ConfirmHazardBody,
  DefectBody,
  ExtendBody,
  LockBody,
  MySheet,
  OnPaperBody,
  PacksBody,
  PledgeBody,
  PledgeReply,
  ProposalAnswer,
  ReopenBody,
  SheetChanges,
  SheetReply,
} from '#shared/schemas/sheet.ts';
import { limit } from '../middlewares/limits.ts';
import { buyRoute, FileReply, type RouteDef } from '../middlewares/route.ts';
import { canPledge, canReadSheet, canRunSheet } from '../policies/sheet.ts';
import { answerProposal } from '../services/sheet/answerProposal.ts';
import { changePledge } from '../services/sheet/changePledge.ts';
import { choosePacks } from '../services/sheet/choosePacks.ts';
import { confirmHazard, confirmOnPaper } from '../services/sheet/confirmHazard.ts';
import { extendBuy } from '../services/sheet/extendBuy.ts';
import { lockBuy } from '../services/sheet/lockBuy.ts';
import { pledgeAlongside } from '../services/sheet/pledgeRows.ts';
import { readChanges } from '../services/sheet/readChanges.ts';
import { readMySheet } from '../services/sheet/readMySheet.ts';
import { readSheetBytes } from '../services/sheet/readSheet.ts';
import { reopenBuy } from '../services/sheet/reopenBuy.ts';
import { reportDefect } from '../services/sheet/reportDefect.ts';

const PledgeParams = z.object({ line: Id, member: Id }).loose();
const done = { done: true } as const;
const defects = limit({
  name: 'defects',
  windowMs: 3_600_000,
  max: 30,
  failuresOnly: false,
  key: (req) => req.user?.id ?? req.ip ?? '',
});

const reading: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/sheet',
    summary: 'The buy sheet: terms, pledges, plan; by version, with ETag',
    former: true,
    reply: SheetReply,
    allow: canReadSheet,
    run: async ({ actor, req }) => {
      const bytes = await readSheetBytes(actor);
      const packed = req.acceptsEncodings('gzip') === 'gzip';
      return new FileReply('application/json', packed ? bytes.gzip() : bytes.plain, {
        etag: bytes.etag,
        headers: { Vary: 'Accept-Encoding', ...(packed ? { 'Content-Encoding': 'gzip' } : {}) },
      });
    },
  }),
  buyRoute({
    method: 'get',
    path: '/changes',
    summary: 'What changed on the sheet since a version; the whole sheet beyond 200 pledges',
    former: true,
    query: z.object({
      since: z.coerce.number().pipe(Version),
      terms: z.coerce.number().pipe(Version),
    }),
    reply: SheetChanges,
    allow: canReadSheet,
    run: ({ actor, query }) => readChanges(actor, query),
  }),
  buyRoute({
    method: 'get',
    path: '/sheet/mine',
    summary: "The reader's own part of the sheet, and what they may do",
    former: true,
    reply: MySheet,
    allow: canReadSheet,
    run: ({ actor }) => readMySheet(actor),
  }),
];

const pledging: RouteDef[] = [
  buyRoute({
    method: 'put',
    path: '/lines/:line/pledges/:member',
    summary: 'What a member wants on a line; for someone else only as an organiser of the buy',
    params: PledgeParams,
    body: PledgeBody,
    alongside: (params) => {
      const ids = PledgeParams.safeParse(params);
      return ids.success ? pledgeAlongside(ids.data.line, ids.data.member) : null;
    },
    reply: PledgeReply,
    allow: canPledge,
    run: ({ actor, params, body }) =>
      changePledge(actor, { lineId: params.line, membershipId: params.member }, body),
  }),
  buyRoute({
    method: 'post',
    path: '/proposals/:proposal',
    summary: "Yes or no to an organiser's wish to raise one's pledge",
    params: z.object({ proposal: Id }).loose(),
    body: ProposalAnswer,
    reply: Done,
    allow: canPledge,
    run: async ({ actor, params, body }) => {
      await answerProposal(actor, params.proposal, body.accept);
      return done;
    },
  }),
  buyRoute({
    method: 'post',
    path: '/hazards',
    summary: 'Confirms that the cautions of a classified salt are read; once per salt',
    body: ConfirmHazardBody,
    reply: Done,
    allow: canPledge,
    run: async ({ actor, body }) => {
      await confirmHazard(actor, body.saltId);
      return done;
    },
  }),
  buyRoute({
    method: 'put',
    path: '/members/:member/paper',
    summary: "A guest's signed paper for a classified salt",
    params: z.object({ member: Id }).loose(),
    body: OnPaperBody,
    reply: Done,
    allow: canRunSheet,
    run: async ({ actor, params, body }) => {
      await confirmOnPaper(actor, params.member, body);
      return done;
    },
  }),
];

const moving: RouteDef[] = [
  buyRoute({
    method: 'post',
    path: '/lock',
    summary: 'Locks the buy now',
    body: LockBody,
    reply: BuyHeader,
    allow: canRunSheet,
    run: ({ actor, body }) => lockBuy(actor, body.termsVersion),
  }),
  buyRoute({
    method: 'post',
    path: '/reopen',
    summary: 'Opens a locked buy again, before any order is placed',
    body: ReopenBody,
    reply: BuyHeader,
    allow: canRunSheet,
    run: ({ actor, body }) => reopenBuy(actor, body),
  }),
  buyRoute({
    method: 'post',
    path: '/extend',
    summary: 'Moves the closing time or lowers the minimum; thaws a frozen buy',
    body: ExtendBody,
    reply: BuyHeader,
    allow: canRunSheet,
    run: ({ actor, body }) => extendBuy(actor, body),
  }),
  buyRoute({
    method: 'put',
    path: '/packs',
    summary: "The organiser's own choice of packs, or back to the plan",
    body: PacksBody,
    reply: BuyHeader,
    allow: canRunSheet,
    run: ({ actor, body }) => choosePacks(actor, body),
  }),
  buyRoute({
    method: 'post',
    path: '/defects',
    summary: "A browser's sums that differ from the server's",
    before: [defects],
    body: DefectBody,
    reply: Done,
    allow: canReadSheet,
    run: ({ actor, body }) => {
      reportDefect(actor, body);
      return Promise.resolve(done);
    },
  }),
];

export const sheetRoutes: RouteDef[] = [...reading, ...pledging, ...moving];
