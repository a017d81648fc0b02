import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { join } from 'node:path';
import { serverAccount } from './programs.mjs';

/** @returns whether PostgreSQL's account may enter the folder (root's own home is often closed to it) */
export function canServerReach(folder) {
  const { uid, gid, cwd } = serverAccount();
  return spawnSync('test', ['-x', folder], { uid, gid, cwd, stdio: 'ignore' }).status === 0;
}

/** @returns where the cluster of a data folder lies: in it, or under /var/lib where PostgreSQL can't enter it */
export function placeFor(dataFolder) {
  if (canServerReach(dataFolder)) return join(dataFolder, 'postgres');
  const hash = createHash('sha256').update(dataFolder).digest('hex').slice(0, 12);
  return `/var/lib/tarewell-${hash}`;
}
