import { cpSync, existsSync, mkdirSync, readdirSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { dataFolder } from './project.mjs';

const listFiles = (folder) =>
  existsSync(folder)
    ? readdirSync(folder, { recursive: true }).filter((name) =>
        statSync(join(folder, name)).isFile(),
      )
    : [];

/** Lays the uploaded files of a backup into the data folder, next to those that are there. */
export function addUploads(from) {
  const source = join(from, 'uploads');
  if (!existsSync(source)) return;
  mkdirSync(join(dataFolder, 'uploads'), { recursive: true, mode: 0o700 });
  cpSync(source, join(dataFolder, 'uploads'), { recursive: true });
}

/** Once the database is in place: takes the backup's secret, and removes uploads that it does not hold. */
export function finishFiles(from) {
  const secret = join(from, 'session-secret');
  if (existsSync(secret)) cpSync(secret, join(dataFolder, 'session-secret'));
  const wanted = new Set(listFiles(join(from, 'uploads')));
  for (const name of listFiles(join(dataFolder, 'uploads'))) {
    if (!wanted.has(name)) rmSync(join(dataFolder, 'uploads', name));
  }
}
