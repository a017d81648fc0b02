// `npm run bench [-- NAMES]`: the benchmarks, on a throw-away PostgreSQL that writes as durably as a real one.
import { spawn } from 'node:child_process';
import { cleanEnvironment } from './cleanEnvironment.mjs';
import { onEnd, runCommand } from './command.mjs';
import { startThrowAway } from './postgres/throwAway.mjs';
import { endGroup, exitCode } from './processes.mjs';
import { projectFolder } from './project.mjs';
import { setUp } from './setUp.mjs';
import { step } from './steps.mjs';

await runCommand(async () => {
  await setUp({ debian: ['postgresql', 'glpk-utils', 'chromium'] });
  let url;
  await step('Starting a throw-away PostgreSQL', async () => {
    url = await startThrowAway({ durable: true });
  });
  const args = ['--import', 'tsx', 'tests/bench/main.ts', ...process.argv.slice(2)];
  const child = spawn(process.execPath, args, {
    cwd: projectFolder,
    detached: true,
    stdio: ['ignore', 'inherit', 'inherit'],
    env: { ...cleanEnvironment(), NODE_ENV: 'production', TEST_DATABASE_URL: url },
  });
  onEnd(() => endGroup(child));
  return exitCode(child);
});
