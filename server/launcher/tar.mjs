import { LauncherProblem } from './problem.mjs';
import { lastLines, run } from './processes.mjs';

/** Runs the system's tar. */
export async function tar(args, what) {
  const { code, output } = await run('tar', args);
  if (code !== 0) throw new LauncherProblem(`${what}:\n${lastLines(output, 5)}`);
  return output;
}
