import { select } from '#server/config/database.ts';

export interface QueuedMail {
  subject: string;
  text_body: string;
  club_id: string | null;
}

/** Mails queued for an address, oldest first. */
export function mailsTo(address: string): Promise<QueuedMail[]> {
  return select<QueuedMail>(
    'select subject, text_body, club_id from outbox where lower(address) = lower(:address) order by created_at',
    { address },
  );
}

/** The newest mail to an address, with the token of its link. */
export async function lastMail(address: string): Promise<QueuedMail & { token: string }> {
  const mail = (await mailsTo(address)).at(-1);
  if (!mail) throw new Error(`no mail to ${address}`);
  return {
    ...mail,
    token: /\/(?:reset|confirm-email|join)\/([\w-]{43})/.exec(mail.text_body)?.[1] ?? '',
  };
}
