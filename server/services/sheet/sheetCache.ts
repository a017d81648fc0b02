import { createHash } from 'node:crypto';
import { gzipSync } from 'node:zlib';
import type { SheetReply } from '#shared/schemas/sheet.ts';

/** The bytes of a sheet for one class of readers at one version. */
export interface SheetBytes {
  readonly sheetVersion: number;
  readonly planVersion: number;
  readonly etag: string;
  readonly plain: Buffer;
  /** Made when first asked for. */
  gzip(): Buffer;
  readonly readAt: number;
}

const mostBytes = 64 * 1024 * 1024;
/** A name or a salt's note may change without a version: bytes are read again after this. */
const freshMs = 30_000;

/** Only a cache: whatever is in it can be read again from the database at any time. */
const kept = new Map<string, SheetBytes>();
let size = 0;

/** Turns a sheet into the bytes that are sent; the ETag names versions, reader and content. */
export function makeBytes(sheet: SheetReply): SheetBytes {
  const plain = Buffer.from(JSON.stringify(sheet));
  const planVersion = sheet.plan?.forVersion ?? -1;
  const hash = createHash('sha1').update(plain).digest('base64url').slice(0, 8);
  let packed: Buffer | undefined;
  return {
    sheetVersion: sheet.sheetVersion,
    planVersion,
    etag: `"${sheet.sheetVersion}-${planVersion}-${sheet.reader}-${hash}"`,
    plain,
    gzip: () => (packed ??= gzipSync(plain, { level: 6 })),
    readAt: Date.now(),
  };
}

/** Bytes that are at least as new as these versions, and fresh; the least lately used go first. */
export function findBytes(
  key: string,
  least: { sheetVersion: number; planVersion: number },
): SheetBytes | undefined {
  const bytes = kept.get(key);
  if (!bytes) return undefined;
  const old = Date.now() - bytes.readAt > freshMs;
  if (old || bytes.sheetVersion < least.sheetVersion || bytes.planVersion < least.planVersion) {
    return undefined;
  }
  kept.delete(key);
  kept.set(key, bytes);
  return bytes;
}

/** Keeps bytes, unless newer ones are there already. */
export function keepBytes(key: string, bytes: SheetBytes): void {
  const known = kept.get(key);
  if (known && known.sheetVersion > bytes.sheetVersion) return;
  if (known) size -= known.plain.length;
  kept.delete(key);
  kept.set(key, bytes);
  size += bytes.plain.length;
  for (const [oldest, { plain }] of kept) {
    if (size <= mostBytes || oldest === key) break;
    kept.delete(oldest);
    size -= plain.length;
  }
}
