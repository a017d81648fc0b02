import { spawn } from 'node:child_process';
import { onEnd } from './command.mjs';
import { findFreePortFrom, isFree } from './ports.mjs';
import { LauncherProblem } from './problem.mjs';
import { endGroup } from './processes.mjs';
import { projectFolder } from './project.mjs';

/** The address that the server listens on. */
export const host = process.env.HOST || '127.0.0.1';

/**
 * @returns the server's port: PORT, which must be free, or else the first free one from 4680 up
 */
export async function choosePort() {
  const { PORT } = process.env;
  if (!PORT) {
    const port = await findFreePortFrom(4680, host);
    if (port) return port;
    throw new LauncherProblem(`No port from 4680 up is free on ${host}.`);
  }
  if (PORT === '0' || (await isFree(Number(PORT), host))) return Number(PORT);
  throw new LauncherProblem(
    `Port ${PORT} on ${host} is taken or not allowed. Set PORT to another, or leave it out.`,
  );
}

/**
 * Starts the server in a group of its own, so that Ctrl-C reaches only the launcher, which stops it in order.
 * @param env added to the launcher's
 * @param nodeOptions for Node itself
 */
export function startServer(env, nodeOptions = []) {
  const endWithLauncher = new URL('endWithLauncher.mjs', import.meta.url).href;
  const args = [...nodeOptions, '--import', endWithLauncher, '--import', 'tsx', 'server/main.ts'];
  const child = spawn(process.execPath, args, {
    cwd: projectFolder,
    detached: true,
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    env: { ...process.env, ...env },
  });
  onEnd(() => endGroup(child));
  return child;
}
