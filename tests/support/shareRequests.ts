import fc from 'fast-check';
import type { ShareCharge, ShareLine, SharePledge, ShareRequest } from '#shared/index.ts';

/** A line with plain policies: enough of everything, shelf free of charge. */
export function shareLine(over: Partial<ShareLine> = {}): ShareLine {
  return {
    id: 'kno3',
    availableMg: 25_000_000,
    costMinor: 9500,
    stepMg: 1000,
    surplus: 'shelf',
    shortage: 'scale',
    shelfPays: false,
    ...over,
  };
}

/** A pledge of so many grams, made so many minutes into an evening. */
export function sharePledge(
  memberId: string,
  grams: number,
  minute = 0,
  over: Partial<SharePledge> = {},
): SharePledge {
  const at = new Date(Date.UTC(2026, 2, 1, 19, minute)).toISOString();
  return { memberId, lineId: 'kno3', wantedMg: grams * 1000, at, ...over };
}

/** A charge of a euro and a bit. */
export function shareCharge(over: Partial<ShareCharge> = {}): ShareCharge {
  return { id: 'freight', amountMinor: 1200, basis: 'mass', ...over };
}

/** A request in euro. */
export function shareRequest(
  lines: ShareLine[],
  pledges: SharePledge[],
  charges: ShareCharge[] = [],
): ShareRequest {
  return { currency: 'EUR', lines, pledges, charges };
}

const members = ['amy', 'bo', 'cy', 'Di', 'eve', 'fay', 'gus'];
const lineIds = ['a', 'b', 'c'];

const anyLine = (id: string): fc.Arbitrary<ShareLine> =>
  fc.record(
    {
      id: fc.constant(id),
      availableMg: fc.nat(60_000),
      costMinor: fc.nat(20_000),
      stepMg: fc.constantFrom(1, 7, 500, 1000),
      surplus: fc.constantFrom('spread', 'shelf'),
      shortage: fc.constantFrom('scale', 'queue'),
      taxRate: fc.constantFrom(0.07, 0.19, 0.255),
      reserveMg: fc.nat(3000),
      spreadMaxPermille: fc.nat(300),
      shelfPays: fc.boolean(),
    },
    { requiredKeys: ['id', 'availableMg', 'costMinor', 'stepMg', 'surplus', 'shortage'] },
  );

const anyPledge = (line: ShareLine, memberId: string): fc.Arbitrary<SharePledge> =>
  fc
    .record({
      wanted: fc.nat(Math.floor(15_000 / line.stepMg)),
      upTo: fc.option(fc.nat(Math.floor(25_000 / line.stepMg)), { nil: undefined }),
      minute: fc.nat(3),
    })
    .map(({ wanted, upTo, minute }) => ({
      memberId,
      lineId: line.id,
      wantedMg: wanted * line.stepMg,
      ...(upTo !== undefined && { upToMg: upTo * line.stepMg }),
      at: new Date(Date.UTC(2026, 2, 1, 19, minute)).toISOString(),
    }));

const anyCharge = (id: string): fc.Arbitrary<ShareCharge> =>
  fc.record(
    {
      id: fc.constant(id),
      amountMinor: fc.integer({ min: -3000, max: 9000 }),
      basis: fc.constantFrom('mass', 'value', 'member', 'portion'),
      lineIds: fc.subarray(lineIds),
      taxRate: fc.constantFrom(0.07, 0.19),
    },
    { requiredKeys: ['id', 'amountMinor', 'basis'] },
  );

/** Requests of up to three lines and seven members with every policy, rebates included. */
export const anyShareRequest: fc.Arbitrary<ShareRequest> = fc
  .tuple(...lineIds.map(anyLine))
  .chain((lines) =>
    fc.record({
      currency: fc.constantFrom('EUR', 'JPY', 'KWD'),
      lines: fc.constant(lines),
      pledges: fc
        .tuple(
          ...lines.map((line) =>
            fc.subarray(members).chain((who) => fc.tuple(...who.map((id) => anyPledge(line, id)))),
          ),
        )
        .map((perLine) => perLine.flat()),
      charges: fc.tuple(anyCharge('bags'), anyCharge('freight'), anyCharge('rebate')),
    }),
  );
