import { existsSync, readFileSync } from 'node:fs';
import { LauncherProblem } from './problem.mjs';
import { lastLines, run } from './processes.mjs';
import { inProject, projectFolder } from './project.mjs';
import { step } from './steps.mjs';

const packagesOf = (file) => {
  try {
    return JSON.parse(readFileSync(inProject(file), 'utf8')).packages;
  } catch {
    return null;
  }
};

/**
 * @returns whether node_modules holds what the lock file says. npm keeps a list of what it
 * installed, so this also holds after an `npm ci` by hand. Packages for other systems are absent.
 */
export function areNpmPackagesCurrent() {
  const installed = packagesOf('node_modules/.package-lock.json');
  if (!installed || !existsSync(inProject('node_modules/.bin'))) return false;
  const locked = packagesOf('package-lock.json');
  const sameVersions = Object.entries(installed).every(
    ([path, { version }]) => locked[path]?.version === version,
  );
  const allThere = Object.entries(locked).every(
    ([path, { optional, devOptional }]) =>
      path === '' || optional || devOptional || installed[path],
  );
  return sameVersions && allThere;
}

/** Installs the npm packages of the lock file when node_modules differs from it. */
export async function ensureNpmPackages() {
  if (areNpmPackagesCurrent()) return;
  await step('Installing npm packages', async () => {
    // The few install scripts only rebuild what ships ready-made; NODE_ENV=production must not drop the build tools.
    const args = [
      'ci',
      '--include=dev',
      '--ignore-scripts',
      '--no-audit',
      '--no-fund',
      '--loglevel=error',
    ];
    const { code, output } = await run('npm', args, { cwd: projectFolder });
    if (code !== 0) throw new LauncherProblem(`npm ci failed:\n${lastLines(output)}`);
  });
}
