import { exactSum } from '../money/minor.ts';
import { chargeWeights, type PlacedLine } from './chargeWeights.ts';
import { checkShareRequest, type CheckedRequest } from './checkShareRequest.ts';
import { divideGrams } from './divideGrams.ts';
import { divideMoney } from './divideMoney.ts';
import { explainStep } from './explainStep.ts';
import { chargeSteps, lineSteps, type ChargeResult } from './shareResults.ts';
import type {
  ChargeShare,
  LineShare,
  MemberShare,
  ShareRequest,
  ShareSheet,
  ShareStep,
  ShelfShare,
} from './shareTypes.ts';

/** Where a member's pledge stands on a line. */
type Stand = { result: PlacedLine; index: number };

function divideLine(
  { line, pledges }: CheckedRequest['lines'][number],
  places: number[],
): PlacedLine {
  const grams = divideGrams(line, pledges);
  const shelfWeight = line.shelfPays === false ? 0 : grams.shelfMg;
  const money = divideMoney(line.costMinor, [...grams.mg, shelfWeight], line.taxRate);
  return { line, grams, money, places: pledges.map(({ member }) => places[member] ?? 0) };
}

function divideCharge(
  { charge, lineIds }: CheckedRequest['charges'][number],
  lines: PlacedLine[],
  members: number,
): ChargeResult {
  const own = lines.filter(({ line }) => lineIds.has(line.id));
  const weights = chargeWeights(charge.basis, own, members);
  return { charge, weights, money: divideMoney(charge.amountMinor, weights, charge.taxRate) };
}

function lineShare({ line, grams, money }: PlacedLine, index: number): LineShare {
  return {
    lineId: line.id,
    mg: index < grams.mg.length ? (grams.mg[index] ?? 0) : grams.shelfMg,
    costMinor: money.parts[index] ?? 0,
    taxMinor: money.taxParts[index] ?? 0,
  };
}

function chargeShare({ charge, money }: ChargeResult, place: number): ChargeShare {
  return {
    id: charge.id,
    minor: money.parts[place] ?? 0,
    taxMinor: money.taxParts[place] ?? 0,
  };
}

function totalOf(lines: LineShare[], charges: ChargeShare[]): number {
  const costs = exactSum(
    lines.map((line) => line.costMinor),
    'totalMinor',
  );
  return exactSum([costs, ...charges.map((charge) => charge.minor)], 'totalMinor');
}

function memberShare(
  memberId: string,
  place: number,
  stands: Stand[],
  charges: ChargeResult[],
  currency: string,
): MemberShare {
  const ownLines = stands.map(({ result, index }) => lineShare(result, index));
  const ownCharges = charges.map((result) => chargeShare(result, place));
  const totalMinor = totalOf(ownLines, ownCharges);
  let steps: ShareStep[] | undefined;
  let why: string[] | undefined;
  // A large club's arithmetic takes longer to write down than to do, and is seldom all read.
  return {
    memberId,
    lines: ownLines,
    charges: ownCharges,
    totalMinor,
    get steps() {
      steps ??= [
        ...stands.flatMap(({ result, index }) => lineSteps(result, index)),
        ...charges.flatMap((result) => chargeSteps(result, place)),
        { code: 'total', values: { minor: totalMinor } },
      ];
      return steps;
    },
    get why() {
      why ??= this.steps.map((step) => explainStep(step, currency));
      return why;
    },
  };
}

function shelfShare(lines: PlacedLine[], charges: ChargeResult[], members: number): ShelfShare {
  const ownLines = lines.map((result) => lineShare(result, result.places.length));
  const ownCharges = charges.map((result) => chargeShare(result, members));
  return { lines: ownLines, charges: ownCharges, totalMinor: totalOf(ownLines, ownCharges) };
}

/**
 * Divides what was bought, and what it cost, among those who pledged and the club's shelf. Members
 * come in the order of their earliest pledge, then id; lines and charges by id, so that the sheet
 * doesn't depend on the order of the input. Exact: no sum is ever a cent off.
 *
 * @throws RangeError naming the field, see `checkShareRequest`; past the safe integers too
 */
export function shareOut(request: ShareRequest): ShareSheet {
  const { lines, charges, members, places } = checkShareRequest(request);
  const lineResults = lines.map((entry) => divideLine(entry, places));
  const chargeResults = charges.map((entry) => divideCharge(entry, lineResults, members.length));

  const stands: Stand[][] = members.map(() => []);
  for (const result of lineResults) {
    result.places.forEach((place, index) => stands[place]?.push({ result, index }));
  }
  const shares = members.map((memberId, place) =>
    memberShare(memberId, place, stands[place] ?? [], chargeResults, request.currency),
  );
  const shelf = shelfShare(lineResults, chargeResults, members.length);
  const totals = [...shares.map((share) => share.totalMinor), shelf.totalMinor];
  return { members: shares, shelf, totalMinor: exactSum(totals, 'totalMinor') };
}
