// `npm run pictures`: takes the README's pictures from a demo that is started for it and thrown away.
import { spawn } from 'node:child_process';
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { cleanEnvironment } from './cleanEnvironment.mjs';
import { onEnd, runCommand } from './command.mjs';
import { findFreePort } from './ports.mjs';
import { LauncherProblem } from './problem.mjs';
import { endGroup, exitCode } from './processes.mjs';
import { inProject, projectFolder } from './project.mjs';
import { setUp } from './setUp.mjs';
import { step } from './steps.mjs';

async function isReady(url) {
  try {
    return (await fetch(`${url}/readyz`)).ok;
  } catch {
    return false;
  }
}

async function startDemo(folder) {
  const port = await findFreePort();
  const url = `http://127.0.0.1:${port}`;
  const demo = spawn(process.execPath, [inProject('server/launcher/start.mjs')], {
    cwd: projectFolder,
    detached: true,
    stdio: ['ignore', 'ignore', 'inherit'],
    env: { ...cleanEnvironment(), PORT: String(port), TAREWELL_DATA: folder, LOG_LEVEL: 'warn' },
  });
  onEnd(() => endGroup(demo, { patienceMs: 30_000 }));
  while (!(await isReady(url))) {
    if (demo.exitCode !== null) throw new LauncherProblem('The demo did not start.');
    await pause(200);
  }
  return url;
}

await runCommand(async () => {
  await setUp({ debian: ['postgresql', 'chromium'] });
  const folder = mkdtempSync(join(tmpdir(), 'tarewell-pictures-'));
  onEnd(() => rmSync(folder, { recursive: true, force: true }));
  // Where root's PostgreSQL can enter, its files go with the folder.
  chmodSync(folder, 0o711);
  let url;
  await step('Starting a demo', async () => {
    url = await startDemo(folder);
  });
  const child = spawn(process.execPath, ['--import', 'tsx', 'tests/e2e/pictures.ts'], {
    cwd: projectFolder,
    detached: true,
    stdio: ['ignore', 'inherit', 'inherit'],
    env: { ...cleanEnvironment(), BASE_URL: url },
  });
  onEnd(() => endGroup(child));
  return exitCode(child);
});
