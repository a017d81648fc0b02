import { createHash } from 'node:crypto';
import { publicUrl } from '../config/runtime.ts';

/** The same event and address always give the same Message-ID, so that a mail sent twice is seen as one. */
export function messageId(eventKey: string, address: string): string {
  const digest = createHash('sha256').update(`${eventKey}\n${address.toLowerCase()}`).digest('hex');
  return `<${digest.slice(0, 32)}@${new URL(publicUrl()).hostname}>`;
}
