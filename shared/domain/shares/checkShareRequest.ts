import { wholeAtLeast, wholeSigned } from '../money/minor.ts';
import { currencyExponent } from '../money/currencies.ts';
import { compareIds, compareTurns, instantMs } from './pledgeOrder.ts';
import type { ShareCharge, ShareLine, SharePledge, ShareRequest } from './shareTypes.ts';

/** A pledge with its instant read. */
export type Turn = {
  memberId: string;
  lineId: string;
  wantedMg: number;
  upToMg: number | undefined;
  atMs: number;
};

/** A request that was checked: lines and charges by id, each line's pledges in their order. */
export type CheckedRequest = {
  lines: { line: ShareLine; pledges: Turn[] }[];
  charges: { charge: ShareCharge; lineIds: Set<string> }[];
  /** Members in their order: earliest pledge above zero, then lower id. */
  members: string[];
};

function checkRate(rate: number | undefined, field: string): void {
  if (rate !== undefined && !(Number.isFinite(rate) && rate >= 0)) {
    throw new RangeError(`${field} must be a number of at least 0, not ${rate}`);
  }
}

function checkOneOf(value: string, allowed: readonly string[], field: string): void {
  if (!allowed.includes(value)) {
    throw new RangeError(`${field} must be one of ${allowed.join(', ')}, not ${value}`);
  }
}

function checkLine(line: ShareLine): void {
  const name = `line ${line.id}: `;
  wholeAtLeast(line.availableMg, `${name}availableMg`);
  wholeAtLeast(line.costMinor, `${name}costMinor`);
  wholeAtLeast(line.stepMg, `${name}stepMg`, 1);
  wholeAtLeast(line.reserveMg ?? 0, `${name}reserveMg`);
  wholeAtLeast(line.spreadMaxPermille ?? 0, `${name}spreadMaxPermille`);
  checkRate(line.taxRate, `${name}taxRate`);
  checkOneOf(line.surplus, ['spread', 'shelf'], `${name}surplus`);
  checkOneOf(line.shortage, ['scale', 'queue'], `${name}shortage`);
}

/** Names are put together only for a message, since a large club has very many pledges. */
function checkSteps(mg: number, stepMg: number, pledge: SharePledge, key: string): void {
  if (Number.isSafeInteger(mg) && mg >= 0 && mg % stepMg === 0) return;
  const field = `pledge of ${pledge.memberId} on ${pledge.lineId}: ${key}`;
  wholeAtLeast(mg, field);
  throw new RangeError(`${field} must be a multiple of ${stepMg} mg, not ${mg}`);
}

function checkCharge(charge: ShareCharge, lineIds: ReadonlySet<string>): Set<string> {
  const name = `charge ${charge.id}: `;
  wholeSigned(charge.amountMinor, `${name}amountMinor`);
  checkRate(charge.taxRate, `${name}taxRate`);
  checkOneOf(charge.basis, ['mass', 'value', 'member', 'portion'], `${name}basis`);
  for (const id of charge.lineIds ?? []) {
    if (!lineIds.has(id)) throw new RangeError(`${name}lineIds names no line: ${id}`);
  }
  return new Set(charge.lineIds ?? lineIds);
}

function sortedById<T extends { id: string }>(things: readonly T[], field: string): T[] {
  const sorted = [...things].sort((a, b) => compareIds(a.id, b.id));
  sorted.forEach(({ id }, index) => {
    if (index > 0 && sorted[index - 1]?.id === id) {
      throw new RangeError(`${field} has the id ${id} twice`);
    }
  });
  return sorted;
}

function memberOrder(turns: readonly Turn[]): string[] {
  const first = new Map<string, { atMs: number; memberId: string; asks: boolean }>();
  for (const { memberId, atMs, wantedMg, upToMg = 0 } of turns) {
    const known = first.get(memberId);
    const asks = wantedMg > 0 || upToMg > 0;
    // An empty pledge gives a place only to a member who has no other.
    const earlier = !known || (asks === known.asks ? atMs < known.atMs : asks);
    if (earlier) first.set(memberId, { atMs, memberId, asks });
  }
  return [...first.values()].sort(compareTurns).map(({ memberId }) => memberId);
}

/**
 * Checks a request and puts it in order, so that nothing later depends on the input's.
 *
 * @throws RangeError naming the field for bad numbers, unknown or repeated ids, two pledges of one
 * member on a line, and masses that aren't whole portion steps
 */
export function checkShareRequest(request: ShareRequest): CheckedRequest {
  currencyExponent(request.currency);
  const lines = sortedById(request.lines, 'lines');
  const byLine = new Map(
    lines.map((line) => [line.id, { line, pledges: [] as Turn[], members: new Set<string>() }]),
  );
  lines.forEach(checkLine);

  const turns: Turn[] = [];
  for (const pledge of request.pledges) {
    const { memberId, lineId, wantedMg, upToMg } = pledge;
    const entry = byLine.get(lineId);
    if (!entry) throw new RangeError(`pledge of ${memberId}: lineId names no line: ${lineId}`);
    if (entry.members.has(memberId)) {
      throw new RangeError(`pledge of ${memberId} on ${lineId}: there are two`);
    }
    entry.members.add(memberId);
    checkSteps(wantedMg, entry.line.stepMg, pledge, 'wantedMg');
    if (upToMg !== undefined) checkSteps(upToMg, entry.line.stepMg, pledge, 'upToMg');
    const turn: Turn = {
      memberId,
      lineId,
      wantedMg,
      upToMg,
      atMs: instantMs(pledge.at, 'pledge.at'),
    };
    entry.pledges.push(turn);
    turns.push(turn);
  }
  for (const { pledges } of byLine.values()) pledges.sort(compareTurns);

  const lineIds: ReadonlySet<string> = new Set(byLine.keys());
  return {
    lines: [...byLine.values()],
    charges: sortedById(request.charges, 'charges').map((charge) => ({
      charge,
      lineIds: checkCharge(charge, lineIds),
    })),
    members: memberOrder(turns),
  };
}
