import { z } from 'zod';
import { Instant } from './fields.ts';

/** A mail of a demo club as the local mail server received it. */
export const OutboxMail = z.strictObject({
  id: z.string(),
  from: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
  receivedAt: Instant,
  attachments: z.array(
    z.strictObject({ fileName: z.string(), contentType: z.string(), text: z.string() }),
  ),
});
export type OutboxMail = z.infer<typeof OutboxMail>;

export const OutboxList = z.strictObject({ mails: z.array(OutboxMail), waiting: z.int().min(0) });
export type OutboxList = z.infer<typeof OutboxList>;
