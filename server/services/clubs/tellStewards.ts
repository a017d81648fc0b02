import { select, type Tx } from '../../config/database.ts';
import { queueNotice } from '../notices/queueNotice.ts';

/** Tells the stewards that somebody asks to join, or has joined. */
export async function tellStewards(
  tx: Tx,
  who: {
    clubId: string;
    slug: string;
    clubName: string;
    memberId: string;
    version: number;
    name: string;
    pending: boolean;
  },
): Promise<void> {
  const stewards = await select<{ id: string }>(
    `select id from memberships where club_id = :clubId and is_steward and status = 'active' and id <> :memberId`,
    { clubId: who.clubId, memberId: who.memberId },
    tx,
  );
  await queueNotice(tx, {
    clubId: who.clubId,
    kind: 'invitation',
    eventKey: `membership:${who.memberId}:${who.pending ? 'asks' : 'joined'}:${who.version}`,
    to: stewards.map(({ id }) => id),
    content: who.pending
      ? {
          subject: `${who.name} asks to join ${who.clubName}`,
          paragraphs: [`${who.name} used a join link and waits for a steward's answer.`],
          action: { label: 'Answer', path: `/c/${who.slug}/members` },
        }
      : {
          subject: `${who.name} joined ${who.clubName}`,
          paragraphs: [`${who.name} is in the club now.`],
          action: { label: 'See the members', path: `/c/${who.slug}/members` },
        },
  });
}
