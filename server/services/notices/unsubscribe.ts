import { mayTurnOff } from '#shared/domain/notices/noticeKinds.ts';
import { NoticeKind, type UnsubscribeReply } from '#shared/schemas/notices.ts';
import { execute, select, transact } from '../../config/database.ts';
import { readUnsubscribeToken } from '../../mail/unsubscribeToken.ts';
import { notFound } from '../problem.ts';

/**
 * What a link at the foot of a mail is about. It only reads: mail scanners follow links.
 * @throws DomainProblem 404 for a token that was not made here
 */
export async function readUnsubscribe(token: string): Promise<UnsubscribeReply> {
  const named = readUnsubscribeToken(token);
  const kind = NoticeKind.safeParse(named?.kind);
  if (!named || !kind.success || !mayTurnOff(kind.data)) throw notFound('This link');
  const [row] = await select<{ name: string; notice_off: string[] }>(
    `select c.name, m.notice_off from memberships m join clubs c on c.id = m.club_id where m.id = :id`,
    { id: named.membershipId },
  );
  if (!row) throw notFound('This link');
  return { clubName: row.name, kind: kind.data, off: row.notice_off.includes(kind.data) };
}

/** Turns one kind of notice off for one member (also by a mail program's one-click post), without sign-in. */
export async function unsubscribe(token: string): Promise<UnsubscribeReply> {
  const { kind } = await readUnsubscribe(token);
  const membershipId = readUnsubscribeToken(token)?.membershipId;
  await transact((tx) =>
    execute(
      `update memberships set notice_off = notice_off || to_jsonb(:kind::text)
       where id = :membershipId and not notice_off @> to_jsonb(:kind::text)`,
      { kind, membershipId },
      tx,
    ),
  );
  return readUnsubscribe(token);
}
