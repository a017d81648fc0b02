import type { SheetPledge, SheetTerms } from '../buys/sheetTerms.ts';
import { shareRequestOf, type Received } from '../buys/requests.ts';
import { apportion } from '../shares/apportion.ts';
import { exactSum } from '../money/minor.ts';
import { shareOut } from '../shares/shareOut.ts';
import type { ShareRequest, ShareSheet } from '../shares/shareTypes.ts';
import { excessLossMg, type Reconciliation } from './reconcile.ts';

/** What one member is charged for on one line. */
export interface ChargedShare {
  readonly membershipId: string;
  readonly lineId: string;
  readonly chargedMg: number;
  /** The pledge's time, an instant. */
  readonly at: string;
}

/** What was lost above 2 % of a line, and its price: what the club bears instead of the members. */
export interface ExcessLoss {
  readonly lineId: string;
  readonly mg: number;
  readonly minor: number;
}

export interface FinalShare {
  readonly request: ShareRequest;
  readonly sheet: ShareSheet;
  readonly excess: ExcessLoss[];
  readonly lost: { memberId: string; minor: number }[];
  /** Each member's whole share: what the sheet says and what stayed lost with a supplier. */
  readonly members: { memberId: string; finalMinor: number }[];
  /** Members' finals, the shelf's part and the club's loss: all that the buy cost. */
  readonly totalMinor: number;
}

function excessOf(
  lines: Received['lines'],
  reconciled: Readonly<Record<string, Reconciliation>>,
): ExcessLoss[] {
  return Object.entries(lines).flatMap(([lineId, { costMinor }]) => {
    const line = reconciled[lineId];
    const mg = line ? excessLossMg(line) : 0;
    if (!line || mg === 0 || costMinor === 0) return [];
    const [minor = 0] = apportion(costMinor, [mg, line.netMg - mg]);
    return [{ lineId, mg, minor }];
  });
}

/**
 * What everybody finally pays: `shareOut` in steps of 1 mg of what was charged, of charged and weighed shelf together,
 * at the real cost, so that lost grams raise everyone's price alike.
 *
 * @param costs by line (their `availableMg` is not looked at) and charges; `lost` is added to a member's share as it is
 * @param clubTakesExcess the treasurer's choice: a line's cost without the part of what was lost above 2 % of net
 * @throws RangeError past the safe integers
 */
export function finalShareOf(given: {
  terms: SheetTerms;
  charged: readonly ChargedShare[];
  reconciled: Readonly<Record<string, Reconciliation>>;
  costs: Received;
  lost: readonly { memberId: string; minor: number }[];
  clubTakesExcess: boolean;
}): FinalShare {
  const { terms, charged, reconciled, costs } = given;
  const excess = given.clubTakesExcess ? excessOf(costs.lines, reconciled) : [];
  const pledges = charged.map(({ membershipId, lineId, chargedMg, at }): SheetPledge => ({
    membershipId,
    lineId,
    wantedMg: chargedMg,
    upToMg: null,
    version: 0,
    at,
  }));
  const lines: Received['lines'] = {};
  for (const { id } of terms.lines) {
    const cost = costs.lines[id];
    const own = charged.filter(({ lineId }) => lineId === id).map(({ chargedMg }) => chargedMg);
    lines[id] = {
      availableMg: exactSum([...own, reconciled[id]?.shelfMg ?? 0], 'availableMg'),
      costMinor: (cost?.costMinor ?? 0) - (excess.find(({ lineId }) => lineId === id)?.minor ?? 0),
      ...(cost?.taxRate === undefined ? {} : { taxRate: cost.taxRate }),
    };
  }
  const request = shareRequestOf(terms, pledges, { lines, charges: costs.charges }, 'final');
  const sheet = shareOut(request);

  const finals = new Map(sheet.members.map(({ memberId, totalMinor }) => [memberId, totalMinor]));
  for (const { memberId, minor } of given.lost) {
    finals.set(memberId, (finals.get(memberId) ?? 0) + minor);
  }
  const members = [...finals].map(([memberId, finalMinor]) => ({ memberId, finalMinor }));
  return {
    request,
    sheet,
    excess,
    lost: given.lost.map(({ memberId, minor }) => ({ memberId, minor })),
    members,
    totalMinor: exactSum(
      [
        ...members.map(({ finalMinor }) => finalMinor),
        sheet.shelf.totalMinor,
        ...excess.map(({ minor }) => minor),
      ],
      'totalMinor',
    ),
  };
}
