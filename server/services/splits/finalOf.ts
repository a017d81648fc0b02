import type { ExcessLoss } from '#shared/domain/splits/finalShare.ts';
import type { ShareRequest, ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import type { Tx } from '../../config/database.ts';
import { findSnapshot } from './computeTargets.ts';

/** What the final share took in besides the sheet. */
export interface FinalExtra {
  readonly lost: { memberId: string; minor: number }[];
  readonly excess: ExcessLoss[];
  /** Names of the charges by id. */
  readonly names: Record<string, string>;
}

/** The final share of a buy as it was posted, or null before. */
export async function finalOf(
  buyId: string,
  tx?: Tx,
): Promise<{ request: ShareRequest; sheet: ShareSheet; extra: FinalExtra; at: Date } | null> {
  const snapshot = await findSnapshot(buyId, ['final'], tx);
  return snapshot && { ...snapshot, extra: snapshot.extra as FinalExtra };
}
