import { createHash } from 'node:crypto';

/** Names what a preview was computed from, so that what is confirmed is what was seen. */
export function basisOf(value: unknown): string {
  return createHash('sha256').update(JSON.stringify(value)).digest('base64url').slice(0, 22);
}
