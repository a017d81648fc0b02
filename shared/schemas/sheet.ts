import { z } from 'zod';
import type { PackPlan as PackPlanType } from '../domain/packs/packTypes.ts';
import type { SheetTerms as SheetTermsType } from '../domain/buys/sheetTerms.ts';
import { buyStates } from '../domain/buys/states.ts';
import { DisplayName, Id, Instant, MilligramsField, MinorField, Text, Version } from './fields.ts';

const Shipping = z.union([
  z.strictObject({ kind: z.literal('flat'), minor: MinorField }),
  z.strictObject({
    kind: z.enum(['byMass', 'byValue']),
    steps: z.array(z.strictObject({ upTo: z.int().nullable(), minor: MinorField })),
  }),
]);

const LineSalt = z.strictObject({
  name: z.string(),
  formula: z.string().nullable(),
  classified: z.boolean(),
  reportable: z.boolean(),
  signalWord: z.enum(['Danger', 'Warning']).nullable(),
  hazards: z.array(z.string()),
  pictograms: z.array(z.string()),
  cautions: z.array(
    z.strictObject({
      code: z.string(),
      tone: z.enum(['danger', 'amber', 'slate']),
      text: z.string(),
    }),
  ),
  storage: z.string(),
  note: z.string(),
});

/** What a buy's sums depend on, besides its pledges; see shared/domain/buys/sheetTerms.ts. */
export const SheetTerms = z.strictObject({
  buyId: Id,
  clubId: Id,
  currency: z.string(),
  termsVersion: Version,
  state: z.enum(buyStates),
  closesAt: Instant.nullable(),
  frozenUntil: Instant.nullable(),
  loweringFreezeHours: z.int(),
  minimum: z.strictObject({
    kind: z.enum(['none', 'mass', 'value', 'members']),
    amount: z.int().min(0),
  }),
  leftOverPayer: z.enum(['members', 'shelf']),
  shelfLimitMinor: MinorField,
  spreadMaxPermille: z.int(),
  lines: z.array(
    z.strictObject({
      id: Id,
      saltId: z.string(),
      salt: LineSalt,
      stepMg: MilligramsField,
      reservePermyriad: z.int(),
      surplus: z.enum(['spread', 'shelf']),
      shortage: z.enum(['scale', 'queue']),
      note: z.string(),
      totalsOnly: z.boolean(),
    }),
  ),
  offers: z.array(
    z.strictObject({
      id: Id,
      lineId: Id,
      supplierId: Id,
      label: z.string(),
      packMg: MilligramsField,
      priceMinor: MinorField,
      priceIncludesTax: z.boolean(),
      taxRatePpm: z.int(),
      maxPacks: z.int().nullable(),
      multipleOf: z.int(),
    }),
  ),
  suppliers: z.array(
    z.strictObject({
      id: Id,
      name: z.string(),
      isShelf: z.boolean(),
      shipping: Shipping,
      freeShippingFromMinor: MinorField.nullable(),
      minimumOrderMinor: MinorField.nullable(),
    }),
  ),
  charges: z.array(
    z.strictObject({
      id: Id,
      kind: z.enum(['freight', 'duty', 'bags', 'rebate', 'other']),
      name: z.string(),
      amountMinor: MinorField,
      basis: z.enum(['mass', 'value', 'member', 'portion']),
      supplierId: Id.nullable(),
      lineIds: z.array(Id).nullable(),
      taxRatePpm: z.int(),
    }),
  ),
}) satisfies z.ZodType<SheetTermsType>;

export const PackPlan = z.strictObject({
  feasible: z.boolean(),
  exact: z.boolean(),
  reason: z.string().optional(),
  packs: z.record(z.string(), z.int()),
  goodsMinor: MinorField,
  shippingMinor: MinorField,
  shippingBySupplier: z.record(z.string(), MinorField),
  totalMinor: MinorField,
  leftOverMg: z.record(z.string(), z.int()),
  nextStep: z
    .strictObject({
      lineId: z.string(),
      moreMg: MilligramsField,
      perGramBefore: z.number(),
      perGramAfter: z.number(),
    })
    .optional(),
}) satisfies z.ZodType<PackPlanType>;

/** The newest computed plan and the sheet version it was computed for; it may lag the pledges by a moment. */
export const SheetPlan = z.strictObject({ forVersion: Version, plan: PackPlan });
export type SheetPlan = z.infer<typeof SheetPlan>;

/** One pledge, short, because a sheet holds thousands: line's place, wanted mg, up to mg, version, instant in ms. */
export const PledgeCells = z.tuple([
  z.int().min(0),
  MilligramsField,
  MilligramsField.nullable(),
  Version,
  z.int(),
]);
export type PledgeCells = z.infer<typeof PledgeCells>;

export const SheetMember = z.strictObject({
  membershipId: Id,
  name: z.string(),
  guest: z.boolean(),
  pledges: z.array(PledgeCells),
});
export type SheetMember = z.infer<typeof SheetMember>;

/** Grams of a line whose pledges are shown only as a total: everybody's, this reader's included. */
export const LineTotal = z.strictObject({
  lineId: Id,
  wantedMg: MilligramsField,
  /** Room beyond `wantedMg` of those who said up to. */
  roomMg: MilligramsField,
  members: z.int(),
});
export type LineTotal = z.infer<typeof LineTotal>;

/**
 * The sheet as everybody of one class of readers sees it: `full`, or `totals` where the club shows only the total of a
 * reportable salt. Nothing in it is about money that was paid or is owed.
 */
export const SheetReply = z.strictObject({
  sheetVersion: Version,
  reader: z.enum(['full', 'totals']),
  terms: SheetTerms,
  members: z.array(SheetMember),
  /** Only for the class `totals`: the lines whose single pledges are left out of `members`. */
  totals: z.array(LineTotal),
  plan: SheetPlan.nullable(),
  /** The organiser's own choice of packs; in force as long as it can be ordered and covers every line. */
  planOverride: z.record(z.string(), z.int()).nullable(),
  organisers: z.array(z.strictObject({ membershipId: Id, name: z.string() })),
});
export type SheetReply = z.infer<typeof SheetReply>;

/** One change to a pledge; a pledge that is gone has 0 mg and no `upToMg`. */
export const PledgeChange = z.strictObject({
  membershipId: Id,
  name: z.string(),
  guest: z.boolean(),
  lineId: Id,
  wantedMg: MilligramsField,
  upToMg: MilligramsField.nullable(),
  version: Version,
  at: Instant,
});
export type PledgeChange = z.infer<typeof PledgeChange>;

/** What changed since a version: single pledges, or the whole sheet when terms changed or too much did. */
export const SheetChanges = z.union([
  z.strictObject({
    whole: z.literal(false),
    sheetVersion: Version,
    pledges: z.array(PledgeChange),
    totals: z.array(LineTotal),
    plan: SheetPlan.nullable(),
  }),
  z.strictObject({ whole: z.literal(true), sheet: SheetReply }),
]);
export type SheetChanges = z.infer<typeof SheetChanges>;

/** An organiser's wish to raise somebody's pledge, waiting for their yes. */
export const PledgeProposal = z.strictObject({
  id: Id,
  membershipId: Id,
  name: z.string(),
  lineId: Id,
  wantedMg: MilligramsField,
  upToMg: MilligramsField.nullable(),
  proposedBy: z.string(),
  at: Instant,
});
export type PledgeProposal = z.infer<typeof PledgeProposal>;

export const SheetMay = z.strictObject({
  pledge: z.boolean(),
  pledgeForOthers: z.boolean(),
  planPacks: z.boolean(),
  lock: z.boolean(),
  reopen: z.boolean(),
  extend: z.boolean(),
});
export type SheetMay = z.infer<typeof SheetMay>;

/** The reader's own part of the sheet, never cached for others. */
export const MySheet = z.strictObject({
  sheetVersion: Version,
  membershipId: Id,
  /** All own pledges, also on lines that show only totals. */
  pledges: z.array(PledgeChange),
  /** Salt ids the reader has confirmed to have read the cautions of. */
  confirmed: z.array(z.string()),
  /** Name of the buy whose overdue amount keeps the reader from raising a pledge here, or null. */
  overdueIn: z.string().nullable(),
  /** Own shares where the class of readers can't compute them; null: compute them. */
  share: z
    .strictObject({
      lines: z.array(
        z.strictObject({
          lineId: Id,
          mg: MilligramsField,
          costMinor: MinorField,
          taxMinor: MinorField,
        }),
      ),
      charges: z.array(z.strictObject({ id: z.string(), minor: MinorField, taxMinor: MinorField })),
      totalMinor: MinorField,
      steps: z.array(
        z.strictObject({
          code: z.string(),
          values: z.record(z.string(), z.union([z.number(), z.string()])),
        }),
      ),
      why: z.array(z.string()),
    })
    .nullable(),
  /** To answer for a member; to see whom they asked for an organiser. */
  proposals: z.array(PledgeProposal),
  /** For organisers: who else may be pledged for, and for which classified salts a guest's paper is signed. */
  people: z.array(
    z.strictObject({
      membershipId: Id,
      name: z.string(),
      guest: z.boolean(),
      onPaper: z.array(z.string()),
    }),
  ),
  may: SheetMay,
  /** The server's clock, for countdowns. */
  now: Instant,
});
export type MySheet = z.infer<typeof MySheet>;

export const PledgeBody = z.strictObject({
  wantedMg: MilligramsField,
  upToMg: MilligramsField.nullable(),
  /** The pledge's own version; 0: there is none yet. */
  version: Version,
});
export type PledgeBody = z.infer<typeof PledgeBody>;

/** The pledge as it is now; `proposed`: nothing changed yet, the member was asked. */
export const PledgeReply = z.strictObject({
  sheetVersion: Version,
  pledge: PledgeChange,
  proposed: z.boolean(),
});
export type PledgeReply = z.infer<typeof PledgeReply>;

export const ConfirmHazardBody = z.strictObject({ saltId: z.string().min(1).max(80) });
export type ConfirmHazardBody = z.infer<typeof ConfirmHazardBody>;

/** An organiser's tick that a guest signed on paper for a classified salt. */
export const OnPaperBody = ConfirmHazardBody.extend({ signed: z.boolean() });
export type OnPaperBody = z.infer<typeof OnPaperBody>;

export const ProposalAnswer = z.strictObject({ accept: z.boolean() });
export type ProposalAnswer = z.infer<typeof ProposalAnswer>;

export const LockBody = z.strictObject({ termsVersion: Version });
export type LockBody = z.infer<typeof LockBody>;

export const ReopenBody = z.strictObject({
  termsVersion: Version,
  reason: Text(500).min(3, 'Say why, for everyone who pledged.'),
  closesAt: Instant,
});
export type ReopenBody = z.infer<typeof ReopenBody>;

/** A later closing time, a lower minimum, or both. */
export const ExtendBody = z.strictObject({
  termsVersion: Version,
  /** Null: the closing time stays; a buy past it closes again at once. */
  closesAt: Instant.nullable(),
  minimum: z
    .strictObject({ kind: z.enum(['none', 'mass', 'value', 'members']), amount: z.int().min(0) })
    .optional(),
});
export type ExtendBody = z.infer<typeof ExtendBody>;

export const PacksBody = z.strictObject({
  termsVersion: Version,
  /** Packs by offer id; null: back to the plan. */
  packs: z.record(z.string(), z.int().min(0).max(100_000)).nullable(),
});
export type PacksBody = z.infer<typeof PacksBody>;

/** A browser's sums that differ from the server's for the same version. */
export const DefectBody = z.strictObject({
  kind: z.enum(['plan', 'share']),
  sheetVersion: Version,
  mine: Text(2000),
  server: Text(2000),
  page: DisplayName.optional(),
});
export type DefectBody = z.infer<typeof DefectBody>;
