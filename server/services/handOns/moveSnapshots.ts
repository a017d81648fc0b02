import { moveLine, type MovedLine } from '#shared/domain/buys/moveLine.ts';
import type { ShareRequest, ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { execute, select, type Tx } from '../../config/database.ts';

export interface Hand {
  readonly buyId: string;
  readonly lineId: string;
  readonly fromId: string;
  readonly toId: string;
}

interface Snapshot {
  id: string;
  kind: 'estimate' | 'ordered' | 'targets' | 'final';
  request: ShareRequest;
  sheet: ShareSheet;
}

async function newestOfEachKind(buyId: string, tx?: Tx): Promise<Snapshot[]> {
  return select<Snapshot>(
    `select distinct on (kind) id, kind, request, sheet from snapshots where buy_id = :buyId
     order by kind, created_at desc, id`,
    { buyId },
    tx,
  );
}

const moved = ({ request, sheet }: Snapshot, { lineId, fromId, toId }: Hand) =>
  moveLine(request, sheet, lineId, fromId, toId);

/** Which of the snapshots says what a line costs now: the final share once it is posted, else the estimate. */
function inForce(snapshots: readonly Snapshot[]): Snapshot | undefined {
  return (
    snapshots.find(({ kind }) => kind === 'final') ??
    snapshots.find(({ kind }) => kind === 'estimate')
  );
}

/** What would go along with a line now: its grams, and its cost with its part of the charges; null without estimate. */
export async function quoteHandOn(
  hand: Hand,
  tx?: Tx,
): Promise<Pick<MovedLine, 'mg' | 'amountMinor'> | null> {
  const snapshot = inForce(await newestOfEachKind(hand.buyId, tx));
  return snapshot ? moved(snapshot, hand) : null;
}

/**
 * Writes each kind's newest snapshot anew with the line at its new owner; what was stays as history.
 * @returns grams and amount of the snapshot in force, and of the estimate, which dues follow before the final share
 */
export async function moveSnapshots(
  hand: Hand,
  tx: Tx,
): Promise<{ mg: number; amountMinor: number; isFinal: boolean; estimateMinor: number } | null> {
  const snapshots = await newestOfEachKind(hand.buyId, tx);
  const results = new Map<Snapshot['kind'], MovedLine>();
  for (const snapshot of snapshots) {
    const result = moved(snapshot, hand);
    if (!result) continue;
    results.set(snapshot.kind, result);
    await execute(
      `insert into snapshots (buy_id, kind, terms_version, request, sheet, plan, terms, extra)
       select buy_id, kind, terms_version, :request, :sheet, plan, terms, extra from snapshots where id = :id`,
      {
        id: snapshot.id,
        request: JSON.stringify(result.request),
        sheet: JSON.stringify(result.sheet),
      },
      tx,
    );
  }
  const estimate = results.get('estimate');
  const final = results.get('final');
  const counts = final ?? estimate;
  if (!counts) return null;
  return {
    mg: counts.mg,
    amountMinor: counts.amountMinor,
    isFinal: final !== undefined,
    estimateMinor: estimate?.amountMinor ?? 0,
  };
}
