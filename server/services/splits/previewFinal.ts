import type { FinalPreview } from '#shared/schemas/splits.ts';
import { select } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { wrongState } from '../problem.ts';
import { findSnapshot } from './computeTargets.ts';
import { computeFinal } from './computeFinal.ts';
import { sayShare } from './tellFinal.ts';

/** What the final share would be now, member by member, beside what was asked for at the lock. */
export async function previewFinal(actor: BuyActor): Promise<FinalPreview> {
  if (actor.buy.state !== 'splitting') {
    throw wrongState(
      `The final share is made at the end of the split; the buy is ${actor.buy.state}.`,
    );
  }
  const buyId = actor.buy.id;
  const computed = await computeFinal(buyId);
  const told = await findSnapshot(buyId, ['estimate']);
  const people = await select<{ id: string; name: string; locked: number | null }>(
    `select m.id, m.display_name as name, b.locked_minor as locked from memberships m
     left join buy_members b on b.membership_id = m.id and b.buy_id = :buyId
     where m.club_id = :clubId order by lower(m.display_name), m.id`,
    { buyId, clubId: actor.club.id },
  );
  const names = new Map(computed.terms.lines.map(({ id, salt }) => [id, salt.name]));
  const labels = new Map([...Object.entries(computed.names), ...names]);
  const finals = new Map(computed.share.members.map((each) => [each.memberId, each.finalMinor]));
  const taken = new Set(computed.share.excess.map(({ lineId }) => lineId));
  return {
    basis: computed.basis,
    blocked: computed.blocked,
    members: people.flatMap(({ id, name, locked }) => {
      const sheet = computed.share.sheet.members.find(({ memberId }) => memberId === id);
      const finalMinor = finals.get(id);
      if (finalMinor === undefined && !locked) return [];
      const estimate = told?.sheet.members.find(({ memberId }) => memberId === id);
      const lines = new Set([
        ...(estimate?.lines.map(({ lineId }) => lineId) ?? []),
        ...(sheet?.lines.map(({ lineId }) => lineId) ?? []),
      ]);
      return [
        {
          member: { membershipId: id, name },
          estimateMinor: locked ?? 0,
          finalMinor: finalMinor ?? 0,
          differenceMinor: (finalMinor ?? 0) - (locked ?? 0),
          lostMinor: computed.share.lost.find(({ memberId }) => memberId === id)?.minor ?? 0,
          lines: [...lines].map((lineId) => {
            const own = sheet?.lines.find((line) => line.lineId === lineId);
            return {
              lineId,
              name: names.get(lineId) ?? '',
              estimateMg: estimate?.lines.find((line) => line.lineId === lineId)?.mg ?? 0,
              chargedMg: own?.mg ?? 0,
              costMinor: own?.costMinor ?? 0,
            };
          }),
          why: sheet ? sayShare(sheet, labels).map((row) => row.join(': ')) : [],
        },
      ];
    }),
    shelfMinor: computed.share.sheet.shelf.totalMinor,
    excess: computed.possibleExcess.map((loss) => ({
      ...loss,
      name: names.get(loss.lineId) ?? '',
      taken: taken.has(loss.lineId),
    })),
    clubTakesExcess: computed.clubTakesExcess,
    costMinor: computed.share.totalMinor,
  };
}
