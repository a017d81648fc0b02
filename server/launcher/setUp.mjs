import { mkdirSync } from 'node:fs';
import { ensureClientBuild } from './clientBuild.mjs';
import { onEnd } from './command.mjs';
import { checkNode, ensureDebianPackages } from './machine.mjs';
import { ensureNpmPackages } from './npmPackages.mjs';
import { waitForLock } from './ownerLock.mjs';
import { inProject } from './project.mjs';

/**
 * Brings the machine and the clone to where the project runs. Two commands in one clone wait for each other here.
 * @param debian packages needed
 * @param build whether the client is built too
 */
export async function setUp({ debian, build = true }) {
  checkNode();
  mkdirSync(inProject('dist'), { recursive: true });
  const lock = await waitForLock(inProject('dist/.setting-up.json'));
  onEnd(() => lock.release());
  await ensureDebianPackages(debian);
  await ensureNpmPackages();
  if (build) await ensureClientBuild();
  lock.release();
}
