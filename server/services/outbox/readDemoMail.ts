import type { OutboxList } from '#shared/schemas/outbox.ts';
import { select } from '../../config/database.ts';
import type { ReceivedMail } from '../../fakes/smtp.ts';
import { smtpFake } from '../../mail/transport.ts';
import { notFound } from '../problem.ts';

// A demo club's mail, and the account mail of people who belong to demo clubs alone.
const ofDemoClubs = `
  (o.club_id is not null and exists (select 1 from clubs c where c.id = o.club_id and c.is_demo))
  or (o.club_id is null and exists (
    select 1 from accounts a join memberships m on m.account_id = a.id join clubs c on c.id = m.club_id
    where lower(a.email) = lower(o.address) and c.is_demo)
  and not exists (
    select 1 from accounts a join memberships m on m.account_id = a.id join clubs c on c.id = m.club_id
    where lower(a.email) = lower(o.address) and not c.is_demo))`;

const mostShown = 200;

async function demoMessageIds(): Promise<Set<string>> {
  const rows = await select<{ message_id: string }>(
    `select o.message_id from outbox o where ${ofDemoClubs}`,
  );
  return new Set(rows.map((row) => row.message_id));
}

/** Mail of the demo clubs that the local mail server received, the newest 200 first to last, and how many still wait. */
export async function listDemoMail(): Promise<OutboxList> {
  const ids = await demoMessageIds();
  const received = (await smtpFake()?.list()) ?? [];
  const [row] = await select<{ waiting: number }>(
    `select count(*)::int as waiting from outbox o where o.state = 'queued' and (${ofDemoClubs})`,
  );
  return {
    waiting: row?.waiting ?? 0,
    mails: received
      .filter(({ messageId }) => ids.has(messageId))
      .slice(0, mostShown)
      .map(({ id, from, to, subject, text, receivedAt, attachments }) => ({
        id,
        from,
        to: [...to],
        subject,
        text,
        receivedAt,
        attachments: [...attachments],
      })),
  };
}

/**
 * One received mail of a demo club.
 * @throws DomainProblem 404
 */
export async function readDemoMail(id: string): Promise<ReceivedMail> {
  const mail = await smtpFake()
    ?.read(id)
    .catch(() => undefined);
  if (!mail || !(await demoMessageIds()).has(mail.messageId)) throw notFound('This mail');
  return mail;
}
