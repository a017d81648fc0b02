import { mkdir, open, readFile, rename, rm } from 'node:fs/promises';
import path from 'node:path';
import type { FileStore } from './fileStore.ts';

async function syncFolder(folder: string): Promise<void> {
  const handle = await open(folder, 'r');
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}

/** Files in a folder of this machine; a file is there whole or not at all, also after a power cut. */
export class LocalFiles implements FileStore {
  constructor(private readonly folder: string) {}

  private place(key: string): string {
    if (!/^[a-z0-9]{8,64}$/.test(key)) throw new Error('not a storage key');
    return path.join(this.folder, key.slice(0, 2), key);
  }

  async put(key: string, bytes: Buffer): Promise<void> {
    const place = this.place(key);
    const folder = path.dirname(place);
    await mkdir(folder, { recursive: true, mode: 0o700 });
    const half = `${place}.part`;
    const handle = await open(half, 'wx', 0o600);
    try {
      await handle.writeFile(bytes);
      await handle.sync();
    } finally {
      await handle.close();
    }
    await rename(half, place);
    await syncFolder(folder);
  }

  async get(key: string): Promise<Buffer | null> {
    try {
      return await readFile(this.place(key));
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
      throw error;
    }
  }

  async remove(key: string): Promise<void> {
    await rm(this.place(key), { force: true });
  }
}
