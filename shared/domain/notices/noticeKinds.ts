/** What notices are about, in the order in which a buy meets them. */
export const noticeKinds = [
  'invitation',
  'buy_opened',
  'terms_changed',
  'closing_soon',
  'locked',
  'reopened',
  'cancelled',
  'payment_received',
  'ordered',
  'arrived',
  'split_day',
  'pickup',
  'final_share',
  'reminder',
  'unclaimed',
  'statement',
  'pledge_changed',
  'handed_on',
  'role_changed',
  'account',
  'message',
] as const;
export type NoticeKind = (typeof noticeKinds)[number];

const always: ReadonlySet<NoticeKind> = new Set<NoticeKind>([
  'invitation',
  'locked',
  'reopened',
  'cancelled',
  'payment_received',
  'pickup',
  'final_share',
  'reminder',
  'unclaimed',
  'statement',
  'account',
]);

/** Kinds that tell of money received or owed: seen and sent by the treasurer. */
export const paymentKinds: readonly NoticeKind[] = ['payment_received', 'statement'];

/** Whether a member may turn notices of this kind off: all but what concerns money and pickup. */
export function mayTurnOff(kind: NoticeKind): boolean {
  return !always.has(kind);
}

/** What a kind is about, for a member choosing. */
export const noticeWords: Record<NoticeKind, string> = {
  invitation: 'Invitations',
  buy_opened: 'A buy has opened',
  terms_changed: 'Prices, dates or terms of a buy you pledged in have changed',
  closing_soon: 'A buy closes soon',
  locked: 'A buy has locked, with what you owe',
  reopened: 'A buy has been opened again',
  cancelled: 'A buy has been cancelled',
  payment_received: 'A payment has been received',
  ordered: 'A buy has been ordered',
  arrived: 'The bags have arrived',
  split_day: 'Split day, with the calendar entry',
  pickup: 'Pickup: slot, place and pass',
  final_share: 'Your final share',
  reminder: 'Reminders of what is owed or waits for you',
  unclaimed: 'Something you have not collected',
  statement: 'Statements of your account',
  pledge_changed: 'An organiser changed a pledge of yours',
  handed_on: 'Someone hands a line on to you',
  role_changed: 'Your role in the club has changed',
  account: 'Your sign-in',
  message: 'Messages from an organiser',
};
