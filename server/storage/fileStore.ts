import path from 'node:path';
import { env } from '../config/runtime.ts';
import { LocalFiles } from './localFiles.ts';
import { S3Files } from './s3Files.ts';

/** Where the bytes of uploads are kept; keys are random, so that nothing is ever overwritten. */
export interface FileStore {
  put(key: string, bytes: Buffer, contentType: string): Promise<void>;
  /** The bytes, or null when there are none under this key. */
  get(key: string): Promise<Buffer | null>;
  /** Also right when there was nothing. */
  remove(key: string): Promise<void>;
}

let store: FileStore | undefined;

/** The store that the environment names: an S3-compatible one, or files in the data folder. */
export function fileStore(): FileStore {
  store ??= env.s3 ? new S3Files(env.s3) : new LocalFiles(path.join(env.dataFolder, 'uploads'));
  return store;
}
