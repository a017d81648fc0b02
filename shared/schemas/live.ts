import { z } from 'zod';
import { buyStates } from '../domain/buys/states.ts';
import { Id, Version } from './fields.ts';
import { LineTotal, PledgeChange, SheetPlan } from './sheet.ts';
import type { SplitChange } from './splits.ts';

/** What a client asks of the server over the socket; every ask is answered. */
export const JoinBuy = z.strictObject({ club: z.string(), buy: Id });
export type JoinBuy = z.infer<typeof JoinBuy>;

/** Somebody who has the sheet open. */
export const Looker = z.strictObject({ membershipId: Id, name: z.string() });
export type Looker = z.infer<typeof Looker>;

export const JoinAnswer = z.union([
  z.strictObject({ ok: z.literal(true), sheetVersion: Version, lookers: z.array(Looker) }),
  z.strictObject({ ok: z.literal(false), code: z.enum(['signed_out', 'not_found', 'invalid']) }),
]);
export type JoinAnswer = z.infer<typeof JoinAnswer>;

export const BuyLookers = z.strictObject({ buyId: Id, lookers: z.array(Looker) });
export type BuyLookers = z.infer<typeof BuyLookers>;

/**
 * Something on the sheet changed. `pledge`: one pledge, with its person, or only the line's new total where the club
 * shows no more (whoever may see more asks for the changes). `pledges`: several, ask for them. `terms`: read the
 * sheet again. `state`: the buy moved on.
 */
export const BuyChanged = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('pledge'),
    buyId: Id,
    sheetVersion: Version,
    pledge: PledgeChange.nullable(),
    total: LineTotal.nullable(),
  }),
  z.strictObject({ kind: z.enum(['pledges', 'terms']), buyId: Id, sheetVersion: Version }),
  z.strictObject({
    kind: z.literal('state'),
    buyId: Id,
    sheetVersion: Version,
    state: z.enum(buyStates),
    frozen: z.boolean(),
  }),
]);
export type BuyChanged = z.infer<typeof BuyChanged>;

/** The pack plan for a version of the sheet. */
export const BuyPlan = SheetPlan.extend({ buyId: Id });
export type BuyPlan = z.infer<typeof BuyPlan>;

export interface ClientEvents {
  'buy:join': (body: JoinBuy, answer: (reply: JoinAnswer) => void) => void;
  'buy:leave': (body: { buy: string }) => void;
}

/** What the server tells. `buy:changed` carries one small change, never payments, balances or contacts. */
export interface ServerEvents {
  'buy:changed': (change: BuyChanged) => void;
  'buy:plan': (plan: BuyPlan) => void;
  'buy:lookers': (lookers: BuyLookers) => void;
  'split:changed': (change: SplitChange) => void;
  'notices:new': (notice: { clubSlug: string }) => void;
}
