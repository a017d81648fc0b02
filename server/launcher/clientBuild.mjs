import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { LauncherProblem } from './problem.mjs';
import { run } from './processes.mjs';
import { inProject, projectFolder } from './project.mjs';
import { step } from './steps.mjs';

const sources = ['src', 'shared', 'public', 'index.html', 'quasar.config.ts', 'package-lock.json'];
const record = inProject('dist/.build-hash');

function listFiles(path) {
  if (!existsSync(inProject(path))) return [];
  if (!statSync(inProject(path)).isDirectory()) return [path];
  return readdirSync(inProject(path))
    .sort()
    .flatMap((name) => listFiles(join(path, name)));
}

/** @returns a hash over the names and contents of all that the client is built from */
export function hashSources() {
  const hash = createHash('sha256');
  for (const file of sources.flatMap(listFiles)) {
    hash
      .update(`${file}\0`)
      .update(readFileSync(inProject(file)))
      .update('\0');
  }
  return hash.digest('hex');
}

// The cause comes first; long lists of modules follow it.
function errorIn(output) {
  const lines = output.split('\n').filter((line) => !/^\s+at |^\s*$/.test(line));
  const first = lines.findIndex((line) => /failed|error/i.test(line));
  return lines.slice(Math.max(first, 0)).slice(0, 20).join('\n');
}

/** Builds the client when its sources changed since the last complete build. */
export async function ensureClientBuild() {
  const hash = hashSources();
  const built = existsSync(record) && existsSync(inProject('dist/spa/index.html'));
  if (built && readFileSync(record, 'utf8') === hash) return;
  await step('Building the client', async () => {
    const args = [inProject('node_modules/@quasar/app-vite/bin/quasar.js'), 'build'];
    const { code, output } = await run(process.execPath, args, { cwd: projectFolder });
    if (code !== 0) throw new LauncherProblem(`The client could not be built:\n${errorIn(output)}`);
    writeFileSync(record, hash);
  });
}
