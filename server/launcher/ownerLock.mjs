import { randomBytes } from 'node:crypto';
import { readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';
import { identify, isStillThere } from './processes.mjs';

const read = (file) => {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return null;
  }
};

const parse = (text) => {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
};

/** @returns what the live owner of a lock file wrote into it, or null */
export function findHolder(file) {
  const holder = parse(read(file));
  return holder?.file === file && isStillThere(holder) ? holder : null;
}

/**
 * Takes a lock file for this process. A lock whose process is gone, or that was copied here with
 * its folder, is taken over.
 * @param facts more to write into it
 * @returns `{ lock, left }`, left being what an owner that was killed wrote; or `{ holder }`
 */
export async function takeLock(file, facts = {}) {
  const mine = { ...identify(process.pid), file, ...facts };
  let left = null;
  for (;;) {
    try {
      writeFileSync(file, JSON.stringify(mine), { flag: 'wx', mode: 0o600 });
      return { lock: makeLock(file, mine), left };
    } catch (error) {
      if (error.code !== 'EEXIST') throw error;
    }
    const text = read(file);
    const holder = findHolder(file);
    if (holder) return { holder };
    // Empty for a moment while its owner writes it.
    if (text === '') await pause(200);
    if (text !== null && read(file) === text && removeStale(file, text)) left = parse(text);
  }
}

// Two may find the same stale lock: only the one that carries it off by its name may throw it away.
function removeStale(file, text) {
  const aside = `${file}.${randomBytes(4).toString('hex')}`;
  try {
    renameSync(file, aside);
  } catch {
    return false;
  }
  const carried = read(aside);
  if (carried === text) rmSync(aside, { force: true });
  else renameSync(aside, file);
  return carried === text;
}

function makeLock(file, facts) {
  return {
    note(more) {
      Object.assign(facts, more);
      const next = `${file}.next`;
      writeFileSync(next, JSON.stringify(facts), { mode: 0o600 });
      renameSync(next, file);
    },
    release() {
      if (parse(read(file))?.pid === process.pid) rmSync(file, { force: true });
    },
  };
}

/** Takes a lock as soon as its holder lets go of it. */
export async function waitForLock(file) {
  for (;;) {
    const { lock } = await takeLock(file);
    if (lock) return lock;
    await pause(300);
  }
}
