import path from 'node:path';
import { createTransport, type Transporter } from 'nodemailer';
import { env } from '../config/runtime.ts';
import { SmtpFake } from '../fakes/smtp.ts';

let fake: SmtpFake | undefined;
let transport: Transporter | undefined;

/** Opens the way out for mail: SMTP_URL, or the local fake when there is none. */
export async function openMail(): Promise<void> {
  if (!env.smtpUrl) {
    fake = new SmtpFake(path.join(env.dataFolder, 'outbox'));
    await fake.start();
  }
  const url = env.smtpUrl ?? fake?.url;
  if (!url) throw new Error('no way out for mail');
  transport = createTransport(
    { url, connectionTimeout: 10_000, socketTimeout: 30_000 },
    { from: env.mailFrom },
  );
}

export async function closeMail(): Promise<void> {
  transport?.close();
  await fake?.stop();
}

/** The way out for mail; openMail must have run. */
export function mailTransport(): Transporter {
  if (!transport) throw new Error('mail is not open');
  return transport;
}

/** The local fake, when mail goes there. */
export function smtpFake(): SmtpFake | undefined {
  return fake;
}
