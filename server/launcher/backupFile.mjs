import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { dataFolder } from './project.mjs';
import { LauncherProblem } from './problem.mjs';

/** What lies in a backup: the note that says what it is, the dump, and parts of the data folder. */
export const parts = { note: 'backup.json', dump: 'database.dump' };

/** Files and folders of the data folder that belong to an installation beside its database. */
const kept = ['uploads', 'session-secret'];

/** Those of them that exist. */
export const keptHere = () => kept.filter((name) => existsSync(join(dataFolder, name)));

/** The layout of the backup; raised when an older program could not read it. */
export const backupFormat = 1;

/**
 * Reads the note of an unpacked backup.
 * @throws LauncherProblem when it is not one, or a later one
 */
export function readNote(folder) {
  let note;
  try {
    note = JSON.parse(readFileSync(join(folder, parts.note), 'utf8'));
  } catch {
    throw new LauncherProblem('This file is no backup of Tarewell.');
  }
  if (note.program !== 'tarewell' || !existsSync(join(folder, parts.dump))) {
    throw new LauncherProblem('This file is no backup of Tarewell.');
  }
  if (note.format > backupFormat) {
    throw new LauncherProblem('This backup was made by a later version. Update this one first.');
  }
  return note;
}
