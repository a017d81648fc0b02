import { z } from 'zod';
import { Id, Version } from './fields.ts';

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

export interface ClientEvents {
  'buy:join': (body: JoinBuy, answer: (reply: JoinAnswer) => void) => void;
  'buy:leave': (body: { buy: string }) => void;
}

/** What the server tells. `buy:changed` carries one small change, never payments, balances or contacts. */
export interface ServerEvents {
  'buy:changed': (change: unknown) => void;
  'buy:plan': (plan: unknown) => void;
  'buy:lookers': (lookers: BuyLookers) => void;
  'split:changed': (change: unknown) => void;
  'notices:new': (notice: { clubSlug: string }) => void;
}
