import { existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { LauncherProblem } from './problem.mjs';
import { lastLines, run } from './processes.mjs';
import { findPrograms } from './postgres/programs.mjs';
import { step } from './steps.mjs';

/** Stops when Node is older than the oldest that the server runs on. */
export function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major > 20 || (major === 20 && minor >= 11)) return;
  throw new LauncherProblem(`This is Node ${process.versions.node}. Install Node 20.11 or later.`);
}

const inPath = (name) =>
  process.env.PATH.split(delimiter).some((folder) => existsSync(join(folder, name)));

// Debian package -> how to tell that it is there.
const isThere = {
  postgresql: () => findPrograms() !== null,
  chromium: () => existsSync('/usr/bin/chromium'),
  'glpk-utils': () => inPath('glpsol'),
  'poppler-utils': () => inPath('pdftotext'),
};

/**
 * Sees that Debian packages are installed; root installs what is missing.
 * @param names keys of `isThere`
 */
export async function ensureDebianPackages(names) {
  const missing = names.filter((name) => !isThere[name]());
  if (missing.length === 0) return;
  const wanted = missing.join(' ');
  if (process.getuid?.() !== 0 || !inPath('apt-get')) {
    throw new LauncherProblem(
      `Missing: ${wanted}. Install with: sudo apt-get install --no-install-recommends ${wanted}`,
    );
  }
  await step(`Installing Debian packages: ${wanted}`, async () => {
    // In a group of its own: stopped halfway, it would leave the machine's packages half configured.
    const options = {
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
      detached: true,
    };
    // A list that can't be refreshed is no reason to stop: the packages may be known already.
    const update = await run('apt-get', ['-q', 'update'], options);
    const install = ['-q', 'install', '-y', '--no-install-recommends', ...missing];
    const { code, output } = await run('apt-get', install, options);
    if (code !== 0 || missing.some((name) => !isThere[name]())) {
      const log = lastLines(update.code === 0 ? output : `${update.output}\n${output}`);
      throw new LauncherProblem(`apt-get could not install ${wanted}:\n${log}`);
    }
  });
}
