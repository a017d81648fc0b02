import type { HeadBody } from '#shared/schemas/buyTerms.ts';
import type { Buy } from '../../models/Buy.ts';
import type { Say } from './sayTerms.ts';

type Field = Exclude<keyof HeadBody, 'termsVersion' | 'preview'>;
export type HeadValues = Omit<Pick<Buy, Field>, 'leftOverPayer'> & {
  leftOverPayer: 'members' | 'shelf';
};

export const headFields = [
  'name',
  'closesAt',
  'splitsAt',
  'splitEndsAt',
  'place',
  'pickupRules',
  'note',
  'minimumKind',
  'minimumAmount',
  'priceLimitPermille',
  'dueDays',
  'loweringFreezeHours',
  'leftOverPayer',
  'shelfLimitMinor',
  'spreadMaxPermille',
  'bandPermille',
  'unclaimedDays',
] as const satisfies readonly Field[];

const payers = { members: 'members, in the price', shelf: "the club's shelf" } as const;

function minimum({ minimumKind, minimumAmount }: HeadValues, say: Say): string {
  if (minimumKind === 'none') return 'none';
  if (minimumKind === 'mass') return say.pack(minimumAmount);
  return minimumKind === 'value' ? say.money(minimumAmount) : `${minimumAmount} members`;
}

const sentences: Record<Field, (before: HeadValues, after: HeadValues, say: Say) => string | null> =
  {
    name: (before, after) => `The buy is now called “${after.name}”, before “${before.name}”.`,
    closesAt: (before, after, say) =>
      `Closing moved from ${say.at(before.closesAt)} to ${say.at(after.closesAt)}: until then you can change your pledge.`,
    splitsAt: (before, after, say) =>
      `Split day moved from ${say.at(before.splitsAt)} to ${say.at(after.splitsAt)}.`,
    splitEndsAt: (_before, after, say) => `The split day ends ${say.at(after.splitEndsAt)}.`,
    place: (before, after) =>
      before.place
        ? `Place moved from ${before.place} to ${after.place || 'not set'}.`
        : `The place is ${after.place}.`,
    pickupRules: (_before, after) => `Pickup rules: ${after.pickupRules || 'none'}`,
    note: (_before, after) => (after.note ? `Note: ${after.note}` : 'The note is gone.'),
    minimumKind: (before, after, say) =>
      `Minimum ${minimum(after, say)}, before ${minimum(before, say)}. Below it the buy doesn't lock.`,
    minimumAmount: (before, after, say) =>
      before.minimumKind === after.minimumKind
        ? `Minimum ${minimum(after, say)}, before ${minimum(before, say)}. Below it the buy doesn't lock.`
        : null,
    priceLimitPermille: (before, after, say) =>
      `Price limit ${say.percent(after.priceLimitPermille)}, before ${say.percent(before.priceLimitPermille)}: a rise above it after the lock needs your yes.`,
    dueDays: (before, after) =>
      `Payment is due ${after.dueDays} days after the lock, before ${before.dueDays}.`,
    loweringFreezeHours: (before, after) =>
      `In the last ${after.loweringFreezeHours} hours lowering a pledge needs the organiser, before ${before.loweringFreezeHours}.`,
    leftOverPayer: (before, after) =>
      `What is left over is paid by ${payers[after.leftOverPayer]}, before by ${payers[before.leftOverPayer]}.`,
    shelfLimitMinor: (_before, after, say) =>
      `The shelf pays at most ${say.money(after.shelfLimitMinor)}.`,
    spreadMaxPermille: (before, after, say) =>
      `You may get up to ${say.percent(after.spreadMaxPermille)} more than you asked for, before ${say.percent(before.spreadMaxPermille)}.`,
    bandPermille: (before, after, say) =>
      `The weighing band is ${say.percent(after.bandPermille)}, before ${say.percent(before.bandPermille)}.`,
    unclaimedDays: (before, after) =>
      `What isn't collected within ${after.unclaimedDays} days goes to the shelf, before ${before.unclaimedDays}.`,
  };

const same = (a: unknown, b: unknown) =>
  a instanceof Date && b instanceof Date ? a.getTime() === b.getTime() : a === b;

/** Which of a buy's own fields differ. */
export function changedFields(before: HeadValues, after: HeadValues): Field[] {
  return headFields.filter((field) => !same(before[field], after[field]));
}

/** One sentence for each changed field, with what it means for those who pledged. */
export function sayHeadChanges(before: HeadValues, after: HeadValues, say: Say): string {
  return changedFields(before, after)
    .map((field) => sentences[field](before, after, say))
    .filter((sentence) => sentence !== null)
    .join(' ');
}
