import type { FinalShare } from '#shared/domain/splits/finalShare.ts';
import type { Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { ActorClub } from '../actors.ts';
import { sayFor } from '../buys/sayTerms.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { queueNotice } from '../notices/queueNotice.ts';

type Row = readonly [label: string, value: string];

/** Each step of a share as a row: what it is of, then what comes of it. */
export function sayShare(
  member: FinalShare['sheet']['members'][number],
  names: ReadonlyMap<string, string>,
): Row[] {
  return member.steps.flatMap(({ code, values }, index): Row[] => {
    if (code === 'total' || code === 'wanted') return [];
    const id = values['lineId'] ?? values['chargeId'];
    const why = member.why[index] ?? '';
    const cut = why.lastIndexOf(': ');
    return [[`${names.get(String(id)) ?? 'Charge'}: ${why.slice(0, cut)}`, why.slice(cut + 2)]];
  });
}

/** Tells each member their final share, how it comes about, and what is left to pay or comes back. */
export async function tellFinalShares(
  buy: Buy,
  club: ActorClub,
  share: FinalShare,
  names: ReadonlyMap<string, string>,
  to: readonly string[],
  tx: Tx,
): Promise<void> {
  const say = sayFor(club);
  const owed = await owedOfBuy(buy.id, tx);
  const finals = new Map(share.members.map(({ memberId, finalMinor }) => [memberId, finalMinor]));
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'final_share',
    eventKey: `buy:${buy.id}:final`,
    to,
    content: (memberId) => {
      const own = share.sheet.members.find((member) => member.memberId === memberId);
      const lost = share.lost.find((each) => each.memberId === memberId)?.minor ?? 0;
      const total = finals.get(memberId) ?? 0;
      const standing = owed.get(memberId);
      const open = standing?.openMinor ?? 0;
      const credit = standing?.creditMinor ?? 0;
      const carried = standing?.carriedMinor ?? 0;
      const rows: Row[] = [
        ...(own ? sayShare(own, names) : []),
        ...(lost === 0 ? [] : ([['Lost with a supplier that failed', say.money(lost)]] as Row[])),
        ['Your final share', say.money(total)],
        ['Paid so far', say.money(standing?.paidMinor ?? 0)],
      ];
      return {
        subject: `Your final share of ${buy.name}: ${say.money(total)}`,
        paragraphs: [
          `Everything is weighed. Your final share of ${buy.name} is ${say.money(total)}.`,
          open > 0
            ? `Still to pay: ${say.money(open)}.`
            : credit > 0
              ? `You paid ${say.money(credit)} too much: it is your credit.`
              : carried === 0
                ? 'Nothing is left to pay.'
                : `A difference of ${say.money(carried)} is carried on; nothing is asked for now.`,
        ],
        rows,
        action: { label: 'See your share', path: `/c/${club.slug}/buys/${buy.id}/pickup` },
      };
    },
  });
}
