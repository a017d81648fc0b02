import { z } from 'zod';
import { Id, Instant } from './fields.ts';

/** `person`: who did it, or whom it is about; `jobs`: what the program did by itself. `before`: older than this entry. */
export const AuditQuery = z.strictObject({
  action: z.string().max(80).optional(),
  person: z.union([Id, z.literal('jobs')]).optional(),
  buy: Id.optional(),
  before: z.coerce.number().int().min(1).optional(),
});
export type AuditQuery = z.infer<typeof AuditQuery>;

const Content = z.record(z.string(), z.unknown()).nullable();

/** One act: who, what, before, after, when. Members' money is left out for readers who may not see it. */
export const AuditEntry = z.strictObject({
  id: z.int(),
  at: Instant,
  actorId: Id.nullable(),
  actorName: z.string(),
  action: z.string(),
  subjectType: z.string(),
  subjectName: z.string().nullable(),
  buy: z.strictObject({ id: Id, name: z.string() }).nullable(),
  before: Content,
  after: Content,
  moneyHidden: z.boolean(),
});
export type AuditEntry = z.infer<typeof AuditEntry>;

/** Newest first; `next` asks for the page after this one. */
export const AuditPage = z.strictObject({
  entries: z.array(AuditEntry),
  next: z.int().nullable(),
});
export type AuditPage = z.infer<typeof AuditPage>;

/** What the log can be narrowed to. */
export const AuditChoices = z.strictObject({
  actions: z.array(z.string()),
  people: z.array(z.strictObject({ id: z.string(), name: z.string() })),
  buys: z.array(z.strictObject({ id: Id, name: z.string() })),
});
export type AuditChoices = z.infer<typeof AuditChoices>;
