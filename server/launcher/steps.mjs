import { isEnding } from './command.mjs';

let isLineOpen = false;

/** Prints one line; in the middle of a step, below the step's. */
export function say(line) {
  process.stdout.write(isLineOpen ? `\n${line}\n` : `${line}\n`);
  isLineOpen = false;
}

/** @returns a duration as people read it, such as `0.4 s` or `1 min 12 s` */
export function formatDuration(milliseconds) {
  const seconds = milliseconds / 1000;
  if (seconds < 60) return `${seconds.toFixed(1)} s`;
  const whole = Math.round(seconds);
  return `${Math.floor(whole / 60)} min ${whole % 60} s`;
}

/**
 * Does one step and prints one line for it: what it is before, how long it took after.
 * @param work may return a string that replaces "done" in the line
 */
export async function step(what, work) {
  // While the command is being stopped, nothing new begins.
  if (isEnding()) await new Promise(() => {});
  const begun = performance.now();
  process.stdout.write(`${what} ... `);
  isLineOpen = true;
  try {
    const result = await work();
    const outcome = typeof result === 'string' ? result : 'done';
    finish(`${outcome} (${formatDuration(performance.now() - begun)})`);
    return result;
  } catch (error) {
    finish(
      `${isEnding() ? 'stopped' : 'failed'} after ${formatDuration(performance.now() - begun)}`,
    );
    throw error;
  }
}

function finish(outcome) {
  process.stdout.write(`${outcome}\n`);
  isLineOpen = false;
}
