import { createHash } from 'node:crypto';
import { AwsClient } from 'aws4fetch';
import type { FileStore } from './fileStore.ts';

export interface S3Place {
  readonly endpoint: string;
  readonly region: string;
  readonly bucket: string;
  readonly accessKeyId: string;
  readonly secretAccessKey: string;
}

const timeoutMs = 30_000;

/** Objects in an S3-compatible bucket, addressed by path; requests carry the hash of their body and SigV4. */
export class S3Files implements FileStore {
  private readonly client: AwsClient;
  private readonly root: string;

  constructor(place: S3Place) {
    this.client = new AwsClient({
      accessKeyId: place.accessKeyId,
      secretAccessKey: place.secretAccessKey,
      region: place.region,
      service: 's3',
      retries: 3,
    });
    this.root = `${place.endpoint.replace(/\/$/, '')}/${place.bucket}/uploads`;
  }

  private async send(method: string, key: string, body?: Buffer, contentType?: string) {
    const hash = createHash('sha256')
      .update(body ?? '')
      .digest('hex');
    return this.client.fetch(`${this.root}/${key}`, {
      method,
      headers: {
        'X-Amz-Content-Sha256': hash,
        ...(contentType ? { 'Content-Type': contentType } : {}),
      },
      signal: AbortSignal.timeout(timeoutMs),
      ...(body ? { body: new Uint8Array(body) } : {}),
    });
  }

  private refused(method: string, reply: Response): Error {
    return new Error(`S3 ${method} answered ${reply.status}`);
  }

  async put(key: string, bytes: Buffer, contentType: string): Promise<void> {
    const reply = await this.send('PUT', key, bytes, contentType);
    if (!reply.ok) throw this.refused('PUT', reply);
  }

  async get(key: string): Promise<Buffer | null> {
    const reply = await this.send('GET', key);
    if (reply.status === 404) return null;
    if (!reply.ok) throw this.refused('GET', reply);
    return Buffer.from(await reply.arrayBuffer());
  }

  async remove(key: string): Promise<void> {
    const reply = await this.send('DELETE', key);
    if (!reply.ok && reply.status !== 404) throw this.refused('DELETE', reply);
  }
}
