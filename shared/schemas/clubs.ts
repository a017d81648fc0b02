import { z } from 'zod';
import { currencyCodes, isCurrency } from '../domain/money/currencies.ts';
import { longestSlug } from '../domain/clubs/suggestSlug.ts';
import { ClubSlug, DisplayName, Text, Version } from './fields.ts';

const isTimeZone = (name: string): boolean => {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return true;
  } catch {
    return false;
  }
};

const isLocale = (tag: string): boolean => {
  try {
    return Intl.DateTimeFormat.supportedLocalesOf([tag]).length === 1;
  } catch {
    return false;
  }
};

export const ClubName = z.string().trim().min(1, 'Write a name.').max(80, 'At most 80 characters.');
export const NewSlug = z
  .string()
  .trim()
  .min(2, 'At least 2 characters.')
  .max(longestSlug, `At most ${longestSlug} characters.`)
  .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, 'Use a to z, 0 to 9 and single hyphens.');
export const Currency = z
  .string()
  .refine(isCurrency, `Choose one of the ${currencyCodes.length} currencies of ISO 4217.`);
export const TimeZone = z.string().max(60).refine(isTimeZone, 'Choose a time zone from the list.');
export const Locale = z.string().max(35).refine(isLocale, 'Choose a language and region.');
export const Units = z.enum(['metric', 'us']);

export const FoundClubBody = z.strictObject({
  name: ClubName,
  slug: NewSlug,
  displayName: DisplayName,
  currency: Currency,
  locale: Locale,
  timeZone: TimeZone,
  units: Units,
});
export type FoundClubBody = z.infer<typeof FoundClubBody>;

const settings = {
  name: ClubName,
  note: Text(2000),
  contact: Text(500),
  currency: Currency,
  locale: Locale,
  timeZone: TimeZone,
  units: Units,
  placeAddress: Text(500),
  placeNote: Text(1000),
  transferHow: Text(1000),
  joinNeedsApproval: z.boolean(),
  hideReportableGrams: z.boolean(),
  precursorMonths: z
    .int('Whole months.')
    .min(1, 'At least 1 month.')
    .max(120, 'At most 120 months.'),
};

/** A club as its members see it; `currencyFixed` once something stands in its books. */
export const ClubReply = z.strictObject({
  ...settings,
  slug: ClubSlug,
  currency: z.string(),
  locale: z.string(),
  timeZone: z.string(),
  shelfLimitMinor: z.int().min(0),
  version: Version,
  currencyFixed: z.boolean(),
  may: z.strictObject({ edit: z.boolean(), setShelfLimit: z.boolean() }),
});
export type ClubReply = z.infer<typeof ClubReply>;

/** Some of the settings, over the version that was seen. */
export const UpdateClubBody = z.strictObject({
  version: Version,
  ...z.object(settings).partial().shape,
});
export type UpdateClubBody = z.infer<typeof UpdateClubBody>;

/** The most the club's shelf pays for left over; the treasurer's to set. */
export const ShelfLimitBody = z.strictObject({
  version: Version,
  shelfLimitMinor: z.int().min(0, 'Not below zero.').max(Number.MAX_SAFE_INTEGER),
});
export type ShelfLimitBody = z.infer<typeof ShelfLimitBody>;

/** All that strangers see of a club. */
export const PublicClub = z.strictObject({
  slug: ClubSlug,
  name: z.string(),
  note: z.string(),
  contact: z.string(),
});
export type PublicClub = z.infer<typeof PublicClub>;

/** How far a new club has come on the way to its first buy. */
export const FirstSteps = z.strictObject({
  members: z.int().min(0),
  invited: z.int().min(0),
  suppliers: z.int().min(0),
  offers: z.int().min(0),
  buys: z.int().min(0),
  hasContact: z.boolean(),
  hasTransfer: z.boolean(),
});
export type FirstSteps = z.infer<typeof FirstSteps>;

export const FoundedReply = z.strictObject({ slug: ClubSlug });
export type FoundedReply = z.infer<typeof FoundedReply>;
