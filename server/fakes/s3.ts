import { createHash, createHmac, timingSafeEqual } from 'node:crypto';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';

interface Kept {
  readonly bytes: Buffer;
  readonly contentType: string;
}

const sha256 = (data: Buffer | string) => createHash('sha256').update(data).digest('hex');
const hmac = (key: Buffer | string, data: string) =>
  createHmac('sha256', key).update(data).digest();

async function readBody(req: IncomingMessage): Promise<Buffer> {
  const chunks: Buffer[] = [];
  for await (const chunk of req) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks);
}

function answer(res: ServerResponse, status: number, code: string): void {
  res.writeHead(status, { 'Content-Type': 'application/xml' });
  res.end(`<?xml version="1.0" encoding="UTF-8"?><Error><Code>${code}</Code></Error>`);
}

/**
 * An object store for tests: one bucket in memory, PUT, GET and DELETE by path, each request checked by AWS Signature
 * Version 4 as a real store does, the body's hash included.
 */
export class S3Fake {
  readonly objects = new Map<string, Kept>();
  private readonly server: Server;
  url = '';

  constructor(
    private readonly keys: {
      accessKeyId: string;
      secretAccessKey: string;
      region: string;
      bucket: string;
    },
  ) {
    this.server = createServer((req, res) => void this.serve(req, res));
  }

  async start(): Promise<void> {
    await new Promise<void>((resolve) => this.server.listen(0, '127.0.0.1', resolve));
    this.url = `http://127.0.0.1:${(this.server.address() as AddressInfo).port}`;
  }

  async stop(): Promise<void> {
    this.server.closeAllConnections();
    await new Promise<void>((resolve) => this.server.close(() => resolve()));
  }

  /** Whether the Authorization header is what the secret key makes of this very request. */
  private isSigned(req: IncomingMessage, bodyHash: string): boolean {
    const parts =
      /^AWS4-HMAC-SHA256 Credential=([^/]+)\/(\d{8})\/([^/]+)\/s3\/aws4_request, ?SignedHeaders=([^,]+), ?Signature=([0-9a-f]{64})$/.exec(
        req.headers.authorization ?? '',
      );
    const date = String(req.headers['x-amz-date']);
    if (!parts || parts[1] !== this.keys.accessKeyId || parts[3] !== this.keys.region) return false;
    if (!date.startsWith(parts[2] ?? '') || req.headers['x-amz-content-sha256'] !== bodyHash) {
      return false;
    }
    const signed = parts[4] ?? '';
    const headers = signed
      .split(';')
      .map((name) => `${name}:${String(req.headers[name] ?? '').trim()}\n`)
      .join('');
    const canonical = [req.method, req.url, '', headers, signed, bodyHash].join('\n');
    const scope = `${parts[2]}/${parts[3]}/s3/aws4_request`;
    const toSign = ['AWS4-HMAC-SHA256', date, scope, sha256(canonical)].join('\n');
    const key = ['s3', 'aws4_request'].reduce<Buffer>(
      hmac,
      hmac(hmac(`AWS4${this.keys.secretAccessKey}`, parts[2] ?? ''), parts[3] ?? ''),
    );
    return timingSafeEqual(Buffer.from(parts[5] ?? '', 'hex'), hmac(key, toSign));
  }

  private async serve(req: IncomingMessage, res: ServerResponse): Promise<void> {
    const bytes = await readBody(req);
    if (!this.isSigned(req, sha256(bytes))) {
      answer(res, 403, 'SignatureDoesNotMatch');
      return;
    }
    const [, bucket, ...rest] = (req.url ?? '').split('/');
    const key = rest.join('/');
    if (bucket !== this.keys.bucket) {
      answer(res, 404, 'NoSuchBucket');
    } else if (req.method === 'PUT') {
      this.objects.set(key, { bytes, contentType: req.headers['content-type'] ?? '' });
      res.writeHead(200, { ETag: `"${createHash('md5').update(bytes).digest('hex')}"` }).end();
    } else if (req.method === 'DELETE') {
      this.objects.delete(key);
      res.writeHead(204).end();
    } else {
      const kept = this.objects.get(key);
      if (!kept) answer(res, 404, 'NoSuchKey');
      else res.writeHead(200, { 'Content-Type': kept.contentType }).end(kept.bytes);
    }
  }
}
