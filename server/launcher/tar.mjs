import { LauncherProblem } from './problem.mjs';
import { lastLines, run } from './processes.mjs';

/**
 * Runs the system's tar.
 * @param what the message when it fails
 * @param accepted exit codes that are well; 1 means that a file changed or went while it was read
 */
export async function tar(args, what, accepted = [0]) {
  const { code, output } = await run('tar', args);
  if (!accepted.includes(code)) throw new LauncherProblem(`${what}:\n${lastLines(output, 5)}`);
  return output;
}
