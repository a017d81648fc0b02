// `npm test [-- ARGS]`: every test, on a throw-away PostgreSQL; ARGS go to vitest.
import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { cleanEnvironment } from './cleanEnvironment.mjs';
import { isEnding, onEnd, runCommand } from './command.mjs';
import { startThrowAway } from './postgres/throwAway.mjs';
import { endGroup, exitCode } from './processes.mjs';
import { inProject, projectFolder } from './project.mjs';
import { setUp } from './setUp.mjs';
import { say, step } from './steps.mjs';
import { summarise } from './testSummary.mjs';

await runCommand(async () => {
  await setUp({ debian: ['postgresql', 'chromium', 'glpk-utils', 'poppler-utils'] });
  let url;
  await step('Starting a throw-away PostgreSQL', async () => {
    url = await startThrowAway();
  });
  const folder = mkdtempSync(join(tmpdir(), 'tarewell-test-'));
  onEnd(() => rmSync(folder, { recursive: true, force: true }));
  const report = join(folder, 'report.json');
  const args = ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
  const vitest = inProject('node_modules/vitest/vitest.mjs');
  const child = spawn(process.execPath, [vitest, ...args, ...process.argv.slice(2)], {
    cwd: projectFolder,
    detached: true,
    stdio: ['ignore', 'inherit', 'inherit'],
    env: { ...cleanEnvironment(), TEST_DATABASE_URL: url },
  });
  onEnd(() => endGroup(child));
  const code = await exitCode(child);
  if (isEnding()) return 1;
  const { line, remarks, ok } = summarise(report, code);
  for (const remark of remarks) say(remark);
  say(line);
  return ok ? 0 : 1;
});
