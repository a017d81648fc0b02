import { LauncherProblem } from './problem.mjs';
import { endRunning, identify, isSameProcess, parentOf } from './processes.mjs';

const cleanups = [];
let ending = null;

/** Has something undone when the command ends, however it ends; the newest first. */
export function onEnd(cleanup) {
  cleanups.push(cleanup);
}

/** Undoes everything and ends the process. A second call waits for the first. */
export function end(code) {
  ending ??= (async () => {
    await endRunning();
    for (const cleanup of cleanups.reverse()) {
      try {
        await cleanup();
      } catch (error) {
        explain(error);
      }
    }
    process.exit(code);
  })();
  return ending;
}

/** @returns whether the command has begun to end */
export const isEnding = () => ending !== null;

function explain(error) {
  if (error instanceof LauncherProblem) console.error(error.message);
  else if (error.code === 'EACCES' || error.code === 'EPERM') {
    console.error(
      `${error.path ?? error.message} belongs to another account or may not be written.`,
    );
  } else console.error(error);
}

/** @returns the npm that runs this script (its shell may stand between), or null */
export function findNpm() {
  if (!process.env.npm_lifecycle_event) return null;
  let pid = process.ppid;
  for (let steps = 0; pid > 1 && steps < 3; steps++, pid = parentOf(pid)) {
    const npm = identify(pid);
    if (/^npm |npm-cli\.js/.test(npm.command ?? '')) return npm;
  }
  return null;
}

// Killed without a chance to pass it on, npm would leave us running with nobody to stop us.
function endWithNpm() {
  const npm = findNpm();
  if (!npm) return;
  setInterval(() => {
    if (!isSameProcess(npm)) void end(143);
  }, 1000).unref();
}

/**
 * Runs a command: SIGINT, SIGTERM and SIGHUP undo what was set up; a problem is printed as one message.
 * @param main resolves to the exit code
 */
export async function runCommand(main) {
  const codes = { SIGHUP: 129, SIGINT: 130, SIGTERM: 143 };
  for (const [signal, code] of Object.entries(codes)) process.on(signal, () => void end(code));
  for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {});
  endWithNpm();
  try {
    await end((await main()) ?? 0);
  } catch (error) {
    if (ending) return;
    explain(error);
    await end(1);
  }
}
