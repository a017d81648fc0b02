import { select, type Tx } from '../../config/database.ts';
import type { NoticeContent } from '../../mail/renderNotice.ts';
import { queueMail } from '../notices/queueNotice.ts';

/**
 * Mail about an account itself. It belongs to no club, except that a demo person's is marked with their demo club, so
 * that it can be read where the demo's mail is shown.
 */
export async function mailAccount(
  tx: Tx,
  mail: {
    accountId: string;
    eventKey: string;
    address: string;
    greeting: string;
    content: NoticeContent;
  },
): Promise<void> {
  const [demo] = await select<{ id: string }>(
    `select c.id from memberships m join clubs c on c.id = m.club_id
     where m.account_id = :accountId and c.is_demo order by c.created_at, c.id limit 1`,
    { accountId: mail.accountId },
    tx,
  );
  await queueMail(tx, {
    ...(demo ? { clubId: demo.id } : {}),
    kind: 'account',
    eventKey: mail.eventKey,
    address: mail.address,
    greeting: mail.greeting,
    from: 'Tarewell',
    content: mail.content,
  });
}
