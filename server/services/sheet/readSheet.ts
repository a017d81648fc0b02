import type { SheetReply } from '#shared/schemas/sheet.ts';
import { canSeeHiddenGrams } from '../../policies/sheet.ts';
import { presentSheet } from '../../presenters/sheet.ts';
import type { BuyActor } from '../actors.ts';
import { notFound } from '../problem.ts';
import { findBytes, keepBytes, makeBytes, type SheetBytes } from './sheetCache.ts';
import { loadSheetRow } from './sheetRow.ts';

/** The class of readers an actor belongs to. */
export function readerOf(actor: BuyActor): SheetReply['reader'] {
  return actor.buy.hidesReportable && !canSeeHiddenGrams(actor) ? 'totals' : 'full';
}

/** The sheet as this actor may see it, read anew. */
export async function readSheet(actor: BuyActor): Promise<SheetReply> {
  const row = await loadSheetRow(actor.buy.id);
  if (!row) throw notFound('This buy');
  return presentSheet(row, readerOf(actor));
}

const loading = new Map<string, Promise<SheetBytes>>();

async function load(actor: BuyActor, key: string): Promise<SheetBytes> {
  const bytes = makeBytes(await readSheet(actor));
  keepBytes(key, bytes);
  return bytes;
}

/**
 * The sheet's bytes, by version: what the actor's own look-up said is the least that must be in them. Readers who come
 * at once wait for one read. A draft's terms change without a version, so it is always read.
 */
export async function readSheetBytes(actor: BuyActor): Promise<SheetBytes> {
  const { id, state, sheetVersion, planVersion } = actor.buy;
  const key = `${id}:${readerOf(actor)}`;
  if (state === 'draft') return load(actor, key);
  const least = { sheetVersion, planVersion: planVersion ?? -1 };
  const found = findBytes(key, least);
  if (found) return found;
  const wait = `${key}:${sheetVersion}:${planVersion}`;
  let read = loading.get(wait);
  if (!read) {
    read = load(actor, key).finally(() => loading.delete(wait));
    loading.set(wait, read);
  }
  return read;
}
