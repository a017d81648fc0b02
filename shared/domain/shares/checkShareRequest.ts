import { wholeAtLeast, wholeSigned } from '../money/minor.ts';
import { currencyExponent } from '../money/currencies.ts';
import { compareIds, compareTurns, instantMs } from './pledgeOrder.ts';
import type { ShareCharge, ShareLine, SharePledge, ShareRequest } from './shareTypes.ts';

/** A pledge with its instant read; `member` is the member's number in this request. */
export type Turn = {
  member: number;
  memberId: string;
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
  /** The place in that order by a member's number. */
  places: number[];
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

/** What decides a member's place: the earliest pledge that asks for something. */
type First = { number: number; memberId: string; atMs: number; asks: boolean };

/** Members by number in the order in which they were met. */
class Members {
  readonly firsts: First[] = [];
  readonly #numbers = new Map<string, First>();

  meet(pledge: SharePledge, atMs: number): number {
    const { memberId, wantedMg, upToMg = 0 } = pledge;
    const asks = wantedMg > 0 || upToMg > 0;
    const known = this.#numbers.get(memberId);
    if (!known) {
      const first = { number: this.firsts.length, memberId, atMs, asks };
      this.#numbers.set(memberId, first);
      this.firsts.push(first);
      return first.number;
    }
    // An empty pledge gives a place only to a member who has no other.
    if (asks === known.asks ? atMs < known.atMs : asks) {
      known.atMs = atMs;
      known.asks = asks;
    }
    return known.number;
  }
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
  lines.forEach(checkLine);
  const entries = lines.map((line, number) => ({ line, number, pledges: [] as Turn[] }));
  const byLine = new Map(entries.map((entry) => [entry.line.id, entry]));

  const members = new Members();
  const seen = new Set<number>();
  for (const pledge of request.pledges) {
    const { memberId, lineId, wantedMg, upToMg } = pledge;
    const entry = byLine.get(lineId);
    if (!entry) throw new RangeError(`pledge of ${memberId}: lineId names no line: ${lineId}`);
    const { stepMg } = entry.line;
    checkSteps(wantedMg, stepMg, pledge, 'wantedMg');
    if (upToMg !== undefined) checkSteps(upToMg, stepMg, pledge, 'upToMg');
    const atMs = instantMs(pledge.at, 'pledge.at');
    const member = members.meet(pledge, atMs);
    const key = member * lines.length + entry.number;
    if (seen.has(key)) throw new RangeError(`pledge of ${memberId} on ${lineId}: there are two`);
    seen.add(key);
    entry.pledges.push({ member, memberId, wantedMg, upToMg, atMs });
  }
  for (const { pledges } of entries) pledges.sort(compareTurns);

  const order = members.firsts.sort(compareTurns);
  const places: number[] = [];
  order.forEach(({ number }, place) => (places[number] = place));
  const lineIds: ReadonlySet<string> = new Set(byLine.keys());
  return {
    lines: entries,
    charges: sortedById(request.charges, 'charges').map((charge) => ({
      charge,
      lineIds: checkCharge(charge, lineIds),
    })),
    members: order.map(({ memberId }) => memberId),
    places,
  };
}
