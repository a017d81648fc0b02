import { z } from 'zod';

/** Field types that many requests and replies share. */
export const Id = z.uuid();
export const Version = z.int().min(0);
export const MilligramsField = z.int().min(0).max(Number.MAX_SAFE_INTEGER);
export const MinorField = z.int().min(Number.MIN_SAFE_INTEGER).max(Number.MAX_SAFE_INTEGER);
/** An instant in UTC with Z. */
export const Instant = z.iso.datetime();
/** A calendar day in the club's zone. */
export const Day = z.iso.date();
export const ClubSlug = z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/);
export const Email = z
  .email('Write an e-mail address, such as name@example.org.')
  .max(254, 'At most 254 characters.');
export const DisplayName = z.string().trim().min(1, 'Write a name.').max(80);
export const Text = (max: number) => z.string().trim().max(max, `At most ${max} characters.`);

export const Roles = z.strictObject({
  organiser: z.boolean(),
  treasurer: z.boolean(),
  steward: z.boolean(),
});
export type Roles = z.infer<typeof Roles>;

/** Reply of an act that has nothing to tell. */
export const Done = z.strictObject({ done: z.literal(true) });
export type Done = z.infer<typeof Done>;
