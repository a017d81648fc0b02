import { mkdtemp, readdir, rm, stat } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { S3Fake } from '#server/fakes/s3.ts';
import type { FileStore } from '#server/storage/fileStore.ts';
import { LocalFiles } from '#server/storage/localFiles.ts';
import { S3Files } from '#server/storage/s3Files.ts';

const keys = {
  accessKeyId: 'QUILLMEREKEY',
  secretAccessKey: 'a secret that only the two know',
  region: 'eu-central-1',
  bucket: 'club-files',
};
const fake = new S3Fake(keys);
let folder: string;
const stores: Record<string, () => FileStore> = {
  'a folder': () => new LocalFiles(folder),
  'an S3-compatible store': () => new S3Files({ ...keys, endpoint: fake.url }),
};

beforeAll(async () => {
  await fake.start();
  folder = path.join(await mkdtemp(path.join(tmpdir(), 'tarewell-files-')), 'uploads');
});
afterAll(async () => {
  await fake.stop();
  await rm(path.dirname(folder), { recursive: true });
});

describe.each(Object.keys(stores))('files in %s', (name) => {
  const store = () => stores[name]?.() as FileStore;
  const key = 'ab12'.repeat(10);

  it('gives back the bytes that were put, and nothing once they are removed', async () => {
    const bytes = Buffer.from([0, 255, 10, 13, 128]);
    expect(await store().get(key)).toBeNull();
    await store().put(key, bytes, 'image/png');
    expect(await store().get(key)).toEqual(bytes);
    await store().remove(key);
    await store().remove(key);
    expect(await store().get(key)).toBeNull();
  });

  it('holds 10 MB', async () => {
    const bytes = Buffer.alloc(10 * 1024 * 1024, 7);
    await store().put(`c0${key}`, bytes, 'application/pdf');
    expect((await store().get(`c0${key}`))?.equals(bytes)).toBe(true);
  });
});

describe('a folder', () => {
  it('leaves no half file, keeps others out and takes no path for a key', async () => {
    const store = new LocalFiles(folder);
    await store.put('ff'.repeat(20), Buffer.from('x'));
    const inside = await readdir(path.join(folder, 'ff'));
    expect(inside).toEqual(['ff'.repeat(20)]);
    const { mode } = await stat(path.join(folder, 'ff', 'ff'.repeat(20)));
    expect(mode & 0o077).toBe(0);
    await expect(store.get('../../etc/passwd')).rejects.toThrow('storage key');
  });
});

describe('an S3-compatible store', () => {
  it('keeps the type beside the bytes', async () => {
    const store = new S3Files({ ...keys, endpoint: fake.url });
    await store.put('dd'.repeat(20), Buffer.from('a;b'), 'text/csv');
    expect(fake.objects.get(`uploads/${'dd'.repeat(20)}`)?.contentType).toBe('text/csv');
  });

  it.each([
    ['a wrong secret', { secretAccessKey: 'another secret' }],
    ['a wrong key', { accessKeyId: 'SOMEBODYELSE' }],
    ['a wrong region', { region: 'us-east-1' }],
  ])('is refused with %s', async (_what, wrong) => {
    const store = new S3Files({ ...keys, ...wrong, endpoint: fake.url });
    await expect(store.get('dd'.repeat(20))).rejects.toThrow('S3 GET answered 403');
    await expect(store.put('ee'.repeat(20), Buffer.from('x'), 'text/csv')).rejects.toThrow('403');
  });

  it('takes a bucket that is not there for nothing', async () => {
    const store = new S3Files({ ...keys, bucket: 'other', endpoint: fake.url });
    expect(await store.get('dd'.repeat(20))).toBeNull();
    await expect(store.put('dd'.repeat(20), Buffer.from('x'), 'text/csv')).rejects.toThrow('404');
  });
});
