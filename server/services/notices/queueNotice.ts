import { mayTurnOff, type NoticeKind } from '#shared/domain/notices/noticeKinds.ts';
import { select, execute, type Tx } from '../../config/database.ts';
import { logger } from '../../config/logger.ts';
import { renderNotice, type NoticeContent } from '../../mail/renderNotice.ts';
import { messageId } from '../../mail/messageId.ts';

export interface Attachment {
  readonly fileName: string;
  readonly contentType: string;
  readonly text: string;
}

interface Recipient {
  membership_id: string;
  name: string;
  email: string | null;
  notice_off: string[];
  club_name: string;
}

/**
 * Lists a notice in the app for each member and writes one mail per address into the outbox, in the transaction that
 * causes it. The same `eventKey` never reaches an address twice. Guests without sign-in get a mail only when their
 * contact is an address.
 */
export async function queueNotice(
  tx: Tx,
  notice: {
    clubId: string;
    buyId?: string;
    kind: NoticeKind;
    /** Names the event, e.g. `buy:<id>:locked:<termsVersion>`. */
    eventKey: string;
    to: readonly string[];
    content: NoticeContent | ((membershipId: string, name: string) => NoticeContent);
    attachments?: readonly Attachment[];
  },
): Promise<void> {
  if (notice.to.length === 0) return;
  const recipients = await select<Recipient>(
    `select m.id as membership_id, m.display_name as name, m.notice_off, c.name as club_name,
        coalesce(a.email, case when m.guest_contact ~ '^[^@ ]+@[^@ ]+$' then m.guest_contact end) as email
     from memberships m join clubs c on c.id = m.club_id
     left join accounts a on a.id = m.account_id and a.deleted_at is null
     where m.club_id = :clubId and m.id in (:to)`,
    { clubId: notice.clubId, to: notice.to },
    tx,
  );
  for (const recipient of recipients) {
    const content =
      typeof notice.content === 'function'
        ? notice.content(recipient.membership_id, recipient.name)
        : notice.content;
    const [row] = await select<{ id: string }>(
      `insert into notices (club_id, membership_id, buy_id, kind, event_key, subject, body, path)
       values (:clubId, :membershipId, :buyId, :kind, :eventKey, :subject, :body, :path)
       on conflict (event_key, membership_id) do nothing returning id`,
      {
        clubId: notice.clubId,
        membershipId: recipient.membership_id,
        buyId: notice.buyId ?? null,
        kind: notice.kind,
        eventKey: notice.eventKey,
        subject: content.subject,
        body: content.paragraphs.join('\n\n'),
        path: content.action?.path ?? null,
      },
      tx,
    );
    const off = mayTurnOff(notice.kind) && recipient.notice_off.includes(notice.kind);
    if (!row || !recipient.email || off) continue;
    await queueMail(tx, {
      clubId: notice.clubId,
      ...(notice.buyId ? { buyId: notice.buyId } : {}),
      noticeId: row.id,
      kind: notice.kind,
      eventKey: notice.eventKey,
      address: recipient.email,
      membershipId: recipient.membership_id,
      greeting: recipient.name,
      from: recipient.club_name,
      content,
      attachments: notice.attachments ?? [],
    });
  }
}

/** One mail into the outbox; used alone only for people who are not members yet, and for accounts. */
export async function queueMail(
  tx: Tx,
  mail: {
    clubId?: string;
    buyId?: string;
    noticeId?: string;
    kind: NoticeKind;
    eventKey: string;
    address: string;
    membershipId?: string;
    greeting: string;
    from: string;
    content: NoticeContent;
    attachments?: readonly Attachment[];
  },
): Promise<void> {
  const rendered = renderNotice({
    greeting: mail.greeting,
    from: mail.from,
    content: mail.content,
    ...(mail.membershipId && mayTurnOff(mail.kind)
      ? { unsubscribe: { membershipId: mail.membershipId, kind: mail.kind } }
      : {}),
  });
  await execute(
    `insert into outbox (club_id, notice_id, buy_id, kind, event_key, address, message_id, subject, text_body, html_body, headers, attachments)
     values (:clubId, :noticeId, :buyId, :kind, :eventKey, :address, :messageId, :subject, :text, :html, :headers, :attachments)
     on conflict (event_key, address) do nothing`,
    {
      clubId: mail.clubId ?? null,
      noticeId: mail.noticeId ?? null,
      buyId: mail.buyId ?? null,
      kind: mail.kind,
      eventKey: mail.eventKey,
      address: mail.address,
      messageId: messageId(mail.eventKey, mail.address),
      subject: mail.content.subject,
      text: rendered.text,
      html: rendered.html,
      headers: JSON.stringify(rendered.headers),
      attachments: JSON.stringify(mail.attachments ?? []),
    },
    tx,
  );
  tx.afterCommit(() => {
    logger.debug({ kind: mail.kind }, 'mail queued');
    wakeSender();
  });
}

let wake: (() => void) | undefined;

/** The sender registers here to be told of new mail at once; without it, mail waits for the next round. */
export function onMailQueued(listener: () => void): void {
  wake = listener;
}

function wakeSender(): void {
  wake?.();
}
