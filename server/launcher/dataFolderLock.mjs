import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { findNpm, onEnd } from './command.mjs';
import { findHolder, takeLock } from './ownerLock.mjs';
import { LauncherProblem } from './problem.mjs';
import { endProcess, isSameProcess, isStillThere } from './processes.mjs';
import { say } from './steps.mjs';

/** Makes the data folder: root's is open to pass through, because PostgreSQL runs as another account. */
export function makeDataFolder(folder) {
  mkdirSync(folder, { recursive: true, mode: process.getuid?.() === 0 ? 0o711 : 0o700 });
}

const lockOf = (folder) => join(folder, 'running.json');

/** @returns what the command that works on a data folder now wrote into its lock, or null */
export const findRunningInstallation = (folder) => findHolder(lockOf(folder));

// One whose npm was killed is about to stop by itself.
const isClosing = (holder) => Boolean(holder.npm) && !isSameProcess(holder.npm);

/**
 * Claims the data folder for this command until it ends. What a killed predecessor left running is ended first.
 * @param command as it is typed, for whoever comes second
 * @returns the lock, to note `children` in, as `identify` gives them
 */
export async function claimDataFolder(folder, command) {
  makeDataFolder(folder);
  const facts = { doing: command, npm: findNpm() };
  const deadline = Date.now() + 20_000;
  for (;;) {
    const { lock, left, holder } = await takeLock(lockOf(folder), facts);
    if (lock) {
      onEnd(() => lock.release());
      await endLeft(left?.children);
      return lock;
    }
    if (!isClosing(holder) || Date.now() > deadline) throw inUse(folder, holder);
    await pause(200);
  }
}

async function endLeft(children = []) {
  for (const child of children.filter(isStillThere)) {
    await endProcess(child);
    say(`Ended what an earlier start had left running (process ${child.pid}).`);
  }
}

function inUse(folder, { doing, pid, url }) {
  return new LauncherProblem(
    `The data folder ${folder} is in use by "${doing}" (process ${pid}${url ? `, ${url}` : ''}). ` +
      'Stop it first, or set TAREWELL_DATA to another folder.',
  );
}
