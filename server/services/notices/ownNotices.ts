import type { Notice, NoticeList, NoticePreferences } from '#shared/schemas/notices.ts';
import { execute, select, transact } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';

interface Row {
  id: string;
  kind: Notice['kind'];
  subject: string;
  body: string;
  path: string | null;
  created_at: Date;
  read_at: Date | null;
}

/** The actor's latest 200 notices in this club, newest first. */
export async function listOwnNotices(actor: ClubActor): Promise<NoticeList> {
  const rows = await select<Row>(
    `select id, kind, subject, body, path, created_at, read_at from notices
     where membership_id = :membershipId order by created_at desc, id limit 200`,
    { membershipId: actor.membershipId },
  );
  return {
    unread: rows.filter((row) => row.read_at === null).length,
    notices: rows.map((row) => ({
      id: row.id,
      kind: row.kind,
      subject: row.subject,
      body: row.body,
      path: row.path,
      createdAt: row.created_at.toISOString(),
      readAt: row.read_at?.toISOString() ?? null,
    })),
  };
}

/** Marks everything listed so far as read. */
export async function markNoticesRead(actor: ClubActor): Promise<NoticeList> {
  await transact((tx) =>
    execute(
      'update notices set read_at = now() where membership_id = :membershipId and read_at is null',
      { membershipId: actor.membershipId },
      tx,
    ),
  );
  return listOwnNotices(actor);
}

/** Which kinds the actor has turned off in this club. */
export async function readPreferences(actor: ClubActor): Promise<NoticePreferences> {
  const [row] = await select<{ notice_off: NoticePreferences['off'] }>(
    'select notice_off from memberships where id = :membershipId',
    { membershipId: actor.membershipId },
  );
  return { off: row?.notice_off ?? [] };
}

/** Sets which kinds come in the app alone. */
export async function savePreferences(
  actor: ClubActor,
  { off }: NoticePreferences,
): Promise<NoticePreferences> {
  await transact((tx) =>
    execute(
      'update memberships set notice_off = :off where id = :membershipId',
      { membershipId: actor.membershipId, off: JSON.stringify([...new Set(off)].sort()) },
      tx,
    ),
  );
  return readPreferences(actor);
}
