import { select, execute, transact, type Tx } from '../../config/database.ts';
import { logger } from '../../config/logger.ts';
import { mailTransport } from '../../mail/transport.ts';
import type { Attachment } from './queueNotice.ts';

interface Row {
  id: string;
  address: string;
  message_id: string;
  subject: string;
  text_body: string;
  html_body: string;
  headers: Record<string, string>;
  attachments: Attachment[];
  attempts: number;
}

const maxAttempts = 10;

/** Seconds until the next try: 10, 20, 40 ... at most an hour. */
export function backOffSeconds(attempts: number): number {
  return Math.min(3600, 10 * 2 ** (attempts - 1));
}

async function deliver(row: Row): Promise<void> {
  await mailTransport().sendMail({
    to: row.address,
    subject: row.subject,
    text: row.text_body,
    html: row.html_body,
    messageId: row.message_id,
    headers: { ...row.headers, 'Auto-Submitted': 'auto-generated' },
    attachments: row.attachments.map((attachment) => ({
      filename: attachment.fileName,
      contentType: attachment.contentType,
      content: attachment.text,
    })),
  });
}

async function sendOne(tx: Tx): Promise<boolean> {
  const [row] = await select<Row>(
    `select id, address, message_id, subject, text_body, html_body, headers, attachments, attempts from outbox
     where state = 'queued' and next_attempt_at <= clock_timestamp()
     order by next_attempt_at limit 1 for update skip locked`,
    {},
    tx,
  );
  if (!row) return false;
  const attempts = row.attempts + 1;
  try {
    await deliver(row);
    await execute(
      `update outbox set state = 'sent', attempts = :attempts, sent_at = clock_timestamp(), last_error = null where id = :id`,
      { id: row.id, attempts },
      tx,
    );
  } catch (error) {
    const { responseCode, message } = error as { responseCode?: number; message: string };
    const final = (responseCode !== undefined && responseCode >= 500) || attempts >= maxAttempts;
    await execute(
      `update outbox set state = :state, attempts = :attempts, last_error = :message,
         next_attempt_at = clock_timestamp() + make_interval(secs => :wait) where id = :id`,
      {
        id: row.id,
        attempts,
        state: final ? 'failed' : 'queued',
        message: message.slice(0, 500),
        wait: backOffSeconds(attempts),
      },
      tx,
    );
    logger.warn({ kind: 'outbox', id: row.id, attempts, final }, 'mail not accepted');
  }
  return true;
}

/**
 * Sends what is due, one transaction a mail, each row locked while it is under way: several processes share the work.
 * A crash between acceptance and record sends once more under the same Message-ID.
 * @returns how many were tried
 */
export async function sendOutbox(most = 200): Promise<number> {
  let tried = 0;
  while (tried < most && (await transact(sendOne))) tried += 1;
  return tried;
}
