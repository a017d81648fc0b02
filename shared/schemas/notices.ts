import { z } from 'zod';
import { mayTurnOff, noticeKinds } from '../domain/notices/noticeKinds.ts';
import { Id, Instant, Text } from './fields.ts';

export const NoticeKind = z.enum(noticeKinds);
export type NoticeKind = z.infer<typeof NoticeKind>;

/** A notice as its reader has it in the app. */
export const Notice = z.strictObject({
  id: Id,
  kind: NoticeKind,
  subject: z.string(),
  body: z.string(),
  path: z.string().nullable(),
  createdAt: Instant,
  readAt: Instant.nullable(),
});
export type Notice = z.infer<typeof Notice>;

export const NoticeList = z.strictObject({ notices: z.array(Notice), unread: z.int().min(0) });
export type NoticeList = z.infer<typeof NoticeList>;

/** Kinds that a member has turned off. */
export const NoticePreferences = z.strictObject({
  off: z.array(NoticeKind.refine(mayTurnOff, 'This kind stays on.')).max(noticeKinds.length),
});
export type NoticePreferences = z.infer<typeof NoticePreferences>;

/** What a link at the foot of a mail turns off. */
export const UnsubscribeReply = z.strictObject({
  clubName: z.string(),
  kind: NoticeKind,
  off: z.boolean(),
});
export type UnsubscribeReply = z.infer<typeof UnsubscribeReply>;

/** How one mail of a buy fared. */
export const Delivery = z.strictObject({
  id: Id,
  kind: NoticeKind,
  subject: z.string(),
  name: z.string(),
  /** `app`: listed in the app alone, since there is no address or the kind is turned off. */
  state: z.enum(['queued', 'sent', 'failed', 'app']),
  sentAt: Instant.nullable(),
  createdAt: Instant,
  error: z.string().nullable(),
});
export type Delivery = z.infer<typeof Delivery>;

export const DeliveryList = z.strictObject({ deliveries: z.array(Delivery) });
export type DeliveryList = z.infer<typeof DeliveryList>;

/** Someone a notice about a buy can be sent to. */
export const NoticeRecipient = z.strictObject({
  membershipId: Id,
  name: z.string(),
  reach: z.enum(['mail', 'app', 'none']),
  takesPart: z.boolean(),
});
export type NoticeRecipient = z.infer<typeof NoticeRecipient>;

/** Words to start from, and whom they could go to. */
export const NoticeDraft = z.strictObject({
  templates: z.array(
    z.strictObject({
      kind: z.enum(['message', 'split_day']),
      subject: z.string(),
      body: z.string(),
    }),
  ),
  recipients: z.array(NoticeRecipient),
});
export type NoticeDraft = z.infer<typeof NoticeDraft>;

/** A notice in an organiser's own words; `split_day` carries the calendar file. `id` is made by the sender: a repeat sends nothing. */
export const SendNoticeBody = z.strictObject({
  id: Id,
  kind: z.enum(['message', 'split_day']),
  subject: z.string().trim().min(1, 'Write a subject.').max(150),
  body: Text(4000).min(1, 'Write a few words.'),
  to: z.array(Id).min(1, 'Choose at least one person.').max(500),
});
export type SendNoticeBody = z.infer<typeof SendNoticeBody>;

export const SendNoticeReply = z.strictObject({ sent: z.int().min(0) });
export type SendNoticeReply = z.infer<typeof SendNoticeReply>;
