import { z } from 'zod';
import { buyStates } from '../domain/buys/states.ts';
import { Day, Id, Instant, MilligramsField, MinorField, Text, Version } from './fields.ts';

const Mg = MilligramsField;
const GramsNeeded = z.int().min(1, 'More than nothing.').max(Number.MAX_SAFE_INTEGER);

/** Who did something, by name. */
export const SplitPerson = z.strictObject({ membershipId: Id, name: z.string() });
export type SplitPerson = z.infer<typeof SplitPerson>;

export const Spill = z.strictObject({
  id: Id,
  mg: Mg,
  note: z.string(),
  by: SplitPerson,
  at: Instant,
});
export type Spill = z.infer<typeof Spill>;

/** One received pack, with what became of it. Masses in mg; null is not yet weighed. */
export const Bag = z.strictObject({
  id: Id,
  lineId: Id,
  supplierId: Id,
  supplier: z.string(),
  offerId: Id,
  number: z.int(),
  nominalMg: Mg,
  grossMg: Mg.nullable(),
  tareMg: Mg.nullable(),
  tareAssumed: z.boolean(),
  netMg: Mg.nullable(),
  lot: z.string(),
  missing: z.boolean(),
  /** One more than was ordered. */
  extra: z.boolean(),
  damage: z.string(),
  note: z.string(),
  countedBy: z.string().nullable(),
  countedAt: Instant.nullable(),
  portionsMg: Mg,
  spilledMg: Mg,
  spills: z.array(Spill),
  shelfMg: Mg.nullable(),
  closedAt: Instant.nullable(),
  closedBy: z.string().nullable(),
  unaccountedNote: z.string(),
  files: z.int(),
  version: Version,
});
export type Bag = z.infer<typeof Bag>;

export const PortionState = z.enum(['waiting', 'claimed', 'done', 'void']);

export const KeptWeighing = z.strictObject({
  id: Id,
  readingMg: Mg,
  chargedMg: Mg,
  verdict: z.enum(['within', 'below', 'above']),
  station: z.string(),
  scale: z.string(),
  by: SplitPerson,
  at: Instant,
});
export type KeptWeighing = z.infer<typeof KeptWeighing>;

/** What one container holds or will hold: a share of one line, or a part of it. */
export const Portion = z.strictObject({
  id: Id,
  lineId: Id,
  member: SplitPerson,
  code: z.string(),
  part: z.int(),
  parts: z.int(),
  targetMg: Mg,
  targetVersion: Version,
  state: PortionState,
  chargedMg: Mg.nullable(),
  weighedMg: Mg.nullable(),
  bagId: Id.nullable(),
  claimedBy: SplitPerson.nullable(),
  claimedAt: Instant.nullable(),
  station: z.string(),
  weighing: KeptWeighing.nullable(),
  voidReason: z.string(),
  handedOverAt: Instant.nullable(),
  version: Version,
});
export type Portion = z.infer<typeof Portion>;

const LineProgress = z.strictObject({ portions: z.int(), done: z.int() });

export const SplitLine = z.strictObject({
  id: Id,
  saltId: z.string(),
  name: z.string(),
  formula: z.string().nullable(),
  signalWord: z.string().nullable(),
  pictograms: z.array(z.string()),
  hazards: z.array(z.string()),
  cautions: z.array(
    z.strictObject({
      code: z.string(),
      tone: z.enum(['danger', 'amber', 'slate']),
      text: z.string(),
    }),
  ),
  storage: z.string(),
  stepMg: Mg,
  shortage: z.enum(['scale', 'queue']),
  surplus: z.enum(['spread', 'shelf']),
  /** The reader sees only their own portions of it. */
  hidden: z.boolean(),
  progress: LineProgress,
  unaccountedNote: z.string(),
});
export type SplitLine = z.infer<typeof SplitLine>;

/** A supplier's order as far as its packs matter here. */
export const SplitOrder = z.strictObject({
  supplierId: Id,
  supplier: z.string(),
  state: z.string(),
  reference: z.string(),
  note: z.string(),
  version: Version,
  packs: z.array(
    z.strictObject({
      offerId: Id,
      lineId: Id,
      packMg: Mg,
      ordered: z.int(),
      received: z.int().nullable(),
    }),
  ),
});
export type SplitOrder = z.infer<typeof SplitOrder>;

/** Everything the arrival page and the bench show. */
export const SplitSheet = z.strictObject({
  buyId: Id,
  state: z.enum(buyStates),
  termsVersion: Version,
  splitVersion: Version,
  targetVersion: Version,
  bandPermille: z.int(),
  clubTakesExcess: z.boolean(),
  lines: z.array(SplitLine),
  orders: z.array(SplitOrder),
  bags: z.array(Bag),
  portions: z.array(Portion),
});
export type SplitSheet = z.infer<typeof SplitSheet>;

/** What one act changed; `splitVersion` counts them, so that a gap shows. `partly`: there is more than may be told. */
export const SplitChange = z.strictObject({
  buyId: Id,
  splitVersion: Version,
  bags: z.array(Bag),
  portions: z.array(Portion),
  partly: z.boolean(),
});
export type SplitChange = z.infer<typeof SplitChange>;

export const ArrivalBody = z.strictObject({
  version: Version,
  packs: z
    .array(z.strictObject({ offerId: Id, packs: z.int().min(0).max(1000) }))
    .min(1)
    .max(200),
  note: Text(500),
});
export type ArrivalBody = z.infer<typeof ArrivalBody>;

export const BagBody = z.strictObject({
  version: Version,
  grossMg: GramsNeeded.nullable(),
  /** Null: 0.5 % is assumed until the empty bag is weighed. */
  tareMg: Mg.nullable(),
  lot: Text(80),
  missing: z.boolean(),
  damage: Text(500),
  note: Text(500),
});
export type BagBody = z.infer<typeof BagBody>;

export const TermsSeen = z.strictObject({ termsVersion: Version });

/** A step of the targets as a person would see it before it counts. */
export const TargetsPreview = z.strictObject({
  /** Names what it was computed from; applying sends it back. */
  basis: z.string(),
  /** Whether these are the targets that stand. */
  standing: z.boolean(),
  /** Why they can't be applied now, or null. */
  blocked: z.string().nullable(),
  lines: z.array(
    z.strictObject({
      lineId: Id,
      name: z.string(),
      boughtMg: Mg,
      countedMg: Mg,
      wantedMg: Mg,
      targetMg: Mg,
      shelfMg: Mg,
      text: z.string(),
      members: z.array(
        z.strictObject({
          member: SplitPerson,
          wantedMg: Mg,
          estimateMg: Mg,
          standingMg: Mg.nullable(),
          targetMg: Mg,
          kept: z.boolean(),
        }),
      ),
    }),
  ),
});
export type TargetsPreview = z.infer<typeof TargetsPreview>;

export const ApplyTargetsBody = z.strictObject({ termsVersion: Version, basis: z.string() });
export type ApplyTargetsBody = z.infer<typeof ApplyTargetsBody>;

export const ClaimBody = z.strictObject({ station: Text(40) });
export type ClaimBody = z.infer<typeof ClaimBody>;

/** Either by a scale's capacity, or what goes first from a bag that won't reach. */
export const CutBody = z.strictObject({
  version: Version,
  capacityMg: GramsNeeded.optional(),
  firstMg: GramsNeeded.optional(),
});
export type CutBody = z.infer<typeof CutBody>;

export const PortionVersion = z.strictObject({ version: Version });
export const VoidBody = z.strictObject({
  version: Version,
  reason: Text(300).min(1, 'Say why.'),
});
export type VoidBody = z.infer<typeof VoidBody>;

/** One reading, with an id that the device made, so that sending it twice counts once. */
export const WeighingBody = z.strictObject({
  id: Id,
  portionId: Id,
  bagId: Id,
  station: Text(40),
  scale: Text(60),
  divisionMg: GramsNeeded,
  capacityMg: GramsNeeded.nullable(),
  readingMg: GramsNeeded,
  secondLook: z.boolean(),
  targetMg: GramsNeeded,
  targetVersion: Version,
});
export type WeighingBody = z.infer<typeof WeighingBody>;

export const SpillBody = z.strictObject({ id: Id, mg: GramsNeeded, note: Text(300) });
export type SpillBody = z.infer<typeof SpillBody>;

export const CloseBagBody = z.strictObject({
  version: Version,
  shelfMg: Mg,
  /** The empty bag, when it was weighed now. */
  tareMg: Mg.nullable(),
  unaccountedNote: Text(300),
});
export type CloseBagBody = z.infer<typeof CloseBagBody>;

export const LineNoteBody = z.strictObject({ note: Text(300) });
export type LineNoteBody = z.infer<typeof LineNoteBody>;

export const ExcessBody = z.strictObject({ clubTakesExcess: z.boolean() });
export type ExcessBody = z.infer<typeof ExcessBody>;

/** One sum with how it came about. */
const Sum = z.strictObject({ label: z.string(), minor: MinorField, why: z.array(z.string()) });

export const FinalPreview = z.strictObject({
  basis: z.string(),
  /** What must be done first, each a sentence. */
  blocked: z.array(z.string()),
  members: z.array(
    z.strictObject({
      member: SplitPerson,
      estimateMinor: MinorField,
      finalMinor: MinorField,
      differenceMinor: MinorField,
      lostMinor: MinorField,
      lines: z.array(
        z.strictObject({
          lineId: Id,
          name: z.string(),
          estimateMg: Mg,
          chargedMg: Mg,
          costMinor: MinorField,
        }),
      ),
      why: z.array(z.string()),
    }),
  ),
  shelfMinor: MinorField,
  excess: z.array(
    z.strictObject({ lineId: Id, name: z.string(), mg: Mg, minor: MinorField, taken: z.boolean() }),
  ),
  clubTakesExcess: z.boolean(),
  costMinor: MinorField,
});
export type FinalPreview = z.infer<typeof FinalPreview>;

export const FinishBody = z.strictObject({ termsVersion: Version, basis: z.string() });
export type FinishBody = z.infer<typeof FinishBody>;

/** A member's own share through the stages. */
export const MyShare = z.strictObject({
  stage: z.enum(['estimate', 'targets', 'weighed', 'final']),
  lines: z.array(
    z.strictObject({
      lineId: Id,
      name: z.string(),
      formula: z.string().nullable(),
      wantedMg: Mg,
      estimateMg: Mg,
      targetMg: Mg.nullable(),
      weighedMg: Mg.nullable(),
      chargedMg: Mg.nullable(),
      portions: z.array(
        z.strictObject({
          code: z.string(),
          part: z.int(),
          parts: z.int(),
          targetMg: Mg,
          state: PortionState,
          weighedMg: Mg.nullable(),
          lot: z.string(),
          handedOver: z.boolean(),
        }),
      ),
      cost: Sum.nullable(),
      why: z.array(z.string()),
    }),
  ),
  charges: z.array(Sum),
  estimateMinor: MinorField.nullable(),
  finalMinor: MinorField.nullable(),
  lostMinor: MinorField,
  finalOn: Day.nullable(),
});
export type MyShare = z.infer<typeof MyShare>;
