import { spawn, spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, readlinkSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';

const hasProc = existsSync('/proc/self/stat');

function readProc(pid, file) {
  try {
    return readFileSync(`/proc/${pid}/${file}`, 'utf8');
  } catch {
    return null;
  }
}

/** @returns the command line of a process, its parts joined by spaces, or null when there is none */
export function commandLine(pid) {
  if (hasProc) return readProc(pid, 'cmdline')?.replaceAll('\0', ' ').trim() || null;
  const listed = spawnSync('ps', ['-p', String(pid), '-o', 'command='], { encoding: 'utf8' });
  return listed.stdout?.trim() || null;
}

// Field 22 of /proc/PID/stat, in clock ticks since boot; the second field may hold spaces and brackets.
function startedAt(pid) {
  if (hasProc) {
    const stat = readProc(pid, 'stat');
    return stat ? stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19] : null;
  }
  const listed = spawnSync('ps', ['-p', String(pid), '-o', 'lstart='], { encoding: 'utf8' });
  return listed.stdout?.trim() || null;
}

/** What tells a process from a later one that was given the same number. */
export function identify(pid) {
  return { pid, started: startedAt(pid), command: commandLine(pid) };
}

/** @returns whether the process still runs, whatever it calls itself by now */
export function isSameProcess(identity) {
  return Boolean(identity?.started) && startedAt(identity.pid) === identity.started;
}

/** @returns whether the very process that was identified still runs, with the same command line */
export function isStillThere(identity) {
  return isSameProcess(identity) && commandLine(identity.pid) === identity.command;
}

/** @returns the number of a process's parent, or null */
export function parentOf(pid) {
  const stat = hasProc ? readProc(pid, 'stat') : null;
  return stat ? Number(stat.slice(stat.lastIndexOf(')') + 2).split(' ')[1]) : null;
}

/** @returns the numbers of all processes whose working directory is the folder (as far as we may look) */
export function processesIn(folder) {
  if (!hasProc) return [];
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .filter((pid) => {
      try {
        return readlinkSync(`/proc/${pid}/cwd`) === folder;
      } catch {
        return false;
      }
    })
    .map(Number);
}

/** Asks an identified process to end, insists after a while, and waits until it is gone. */
export async function endProcess(identity, { patienceMs = 6000 } = {}) {
  const deadline = Date.now() + patienceMs;
  let signal = 'SIGTERM';
  while (isStillThere(identity)) {
    if (Date.now() > deadline) signal = 'SIGKILL';
    if (signal) {
      try {
        process.kill(identity.pid, signal);
      } catch {
        return;
      }
      signal = null;
    }
    await pause(50);
  }
}

/**
 * Sends a signal to a child that leads its own group, and to all that it started.
 * @param child spawned with `detached: true`
 */
export function signalGroup(child, signal) {
  try {
    process.kill(-child.pid, signal);
  } catch {
    // It is gone already.
  }
}

/** Ends a child that leads its own group: asks, and insists after a while. */
export function endGroup(child, { signal = 'SIGTERM', patienceMs = 8000 } = {}) {
  if (child.exitCode !== null || child.signalCode !== null) return Promise.resolve();
  return new Promise((resolve) => {
    const insist = setTimeout(() => signalGroup(child, 'SIGKILL'), patienceMs);
    child.once('exit', () => {
      clearTimeout(insist);
      resolve();
    });
    signalGroup(child, signal);
  });
}

/** @returns the exit code of a child; 1 when a signal ended it or it could not start */
export function exitCode(child) {
  return new Promise((resolve) => {
    child.once('error', () => resolve(1));
    child.once('exit', (code) => resolve(code ?? 1));
  });
}

const running = new Map();

/** Ends the programs that `run` waits for, and waits too; those in a group of their own finish by themselves. */
export async function endRunning() {
  const signalAll = (signal) => {
    for (const [child, { detached }] of running) if (!detached) child.kill(signal);
  };
  signalAll('SIGTERM');
  const insist = setTimeout(() => signalAll('SIGKILL'), 2000);
  await Promise.race([
    Promise.all([...running.values()].map(({ closed }) => closed)),
    pause(15_000),
  ]);
  clearTimeout(insist);
}

/**
 * Runs a program to its end and keeps what it printed.
 * @returns `{ code, output }`, where code is null when a signal ended it
 */
export function run(program, args, options = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, { stdio: ['ignore', 'pipe', 'pipe'], ...options });
    const closed = new Promise((done) => child.once('close', done));
    running.set(child, { detached: options.detached, closed });
    let output = '';
    for (const stream of [child.stdout, child.stderr]) {
      stream?.setEncoding('utf8').on('data', (text) => (output += text));
    }
    child.once('error', reject);
    child.once('close', (code) => {
      running.delete(child);
      resolve({ code, output });
    });
  });
}

/** The last lines of an output, for a message about what went wrong. */
export const lastLines = (output, count = 25) => output.trim().split('\n').slice(-count).join('\n');
