import { randomUUID } from 'node:crypto';
import { mkdir, readdir, readFile, rename, rm, writeFile } from 'node:fs/promises';
import type { AddressInfo } from 'node:net';
import path from 'node:path';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

/** A message as the fake received it. */
export interface ReceivedMail {
  readonly id: string;
  readonly messageId: string;
  readonly from: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly receivedAt: string;
  readonly attachments: readonly { fileName: string; contentType: string; text: string }[];
}

const kept = 500;

/**
 * A mail server for demo and tests: it speaks SMTP on loopback, delivers nothing and keeps each message as a file.
 * Addresses at `refused.example` are refused for good, those at `later.example` for now.
 */
export class SmtpFake {
  private readonly server: SMTPServer;
  url = '';

  constructor(private readonly folder: string) {
    this.server = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS', 'AUTH'],
      onRcptTo: ({ address }, _session, done) => {
        const refusal = address.endsWith('@refused.example')
          ? Object.assign(new Error('No such mailbox'), { responseCode: 550 })
          : address.endsWith('@later.example')
            ? Object.assign(new Error('Mailbox busy'), { responseCode: 450 })
            : null;
        done(refusal);
      },
      onData: (stream, _session, done) => {
        const chunks: Buffer[] = [];
        stream.on('data', (chunk: Buffer) => chunks.push(chunk));
        stream.on('error', done);
        stream.on('end', () => {
          this.keep(Buffer.concat(chunks)).then(() => done(), done);
        });
      },
    });
  }

  /** Listens on a free loopback port; `url` is set afterwards. */
  async start(): Promise<void> {
    await mkdir(this.folder, { recursive: true });
    await new Promise<void>((resolve, reject) => {
      this.server.on('error', reject);
      this.server.listen(0, '127.0.0.1', resolve);
    });
    // A client that goes away in mid-sentence must not end the process.
    this.server.on('error', () => undefined);
    const { port } = this.server.server.address() as AddressInfo;
    this.url = `smtp://127.0.0.1:${port}`;
  }

  async stop(): Promise<void> {
    await new Promise<void>((resolve) => this.server.close(() => resolve()));
  }

  private async keep(bytes: Buffer): Promise<void> {
    const name = `${String(Date.now()).padStart(15, '0')}-${randomUUID()}`;
    const file = path.join(this.folder, `${name}.eml`);
    await writeFile(`${file}.part`, bytes);
    await rename(`${file}.part`, file);
    const files = await this.files();
    for (const old of files.slice(kept)) await rm(path.join(this.folder, old), { force: true });
  }

  private async files(): Promise<string[]> {
    const files = await readdir(this.folder);
    return files.filter((file) => file.endsWith('.eml')).sort((a, b) => (a < b ? 1 : -1));
  }

  /** Everything received, newest first. */
  async list(): Promise<ReceivedMail[]> {
    return Promise.all((await this.files()).map((file) => this.read(file.replace(/\.eml$/, ''))));
  }

  /** One message by the id that `list` gave. */
  async read(id: string): Promise<ReceivedMail> {
    const mail = await simpleParser(
      await readFile(path.join(this.folder, `${path.basename(id)}.eml`)),
    );
    const to = mail.to === undefined ? [] : Array.isArray(mail.to) ? mail.to : [mail.to];
    return {
      id,
      messageId: mail.messageId ?? '',
      from: mail.from?.text ?? '',
      to: to.flatMap(({ value }) => value.map(({ address }) => address ?? '')),
      subject: mail.subject ?? '',
      text: mail.text ?? '',
      html: mail.html || '',
      receivedAt: new Date(Number(id.split('-')[0])).toISOString(),
      attachments: mail.attachments.map((attachment) => ({
        fileName: attachment.filename ?? 'attachment',
        contentType: attachment.contentType,
        text: attachment.contentType.startsWith('text/') ? attachment.content.toString('utf8') : '',
      })),
    };
  }
}
