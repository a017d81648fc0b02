import { chmodSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { onEnd } from '../command.mjs';
import { identify, isStillThere } from '../processes.mjs';
import {
  createCluster,
  makePassword,
  startCluster,
  stopCluster,
  superuser,
  urlOf,
} from './cluster.mjs';
import { canServerReach } from './place.mjs';

const prefix = 'tarewell-throw-away-';

// Safe only for data that nobody will miss.
const careless = [
  'fsync = off',
  'synchronous_commit = off',
  'full_page_writes = off',
  'autovacuum_naptime = 10s',
];

function parentFolder() {
  return canServerReach(tmpdir()) ? tmpdir() : '/var/tmp';
}

/** Removes throw-away clusters whose owner was killed. */
export async function clearAbandoned() {
  for (const name of readdirSync(parentFolder()).filter((name) => name.startsWith(prefix))) {
    const folder = join(parentFolder(), name);
    try {
      const owner = JSON.parse(readFileSync(join(folder, 'owner.json'), 'utf8'));
      if (owner.uid !== process.getuid?.() || isStillThere(owner)) continue;
      await stopCluster(join(folder, 'cluster'), 'immediate');
      rmSync(folder, { recursive: true, force: true });
    } catch {
      // Somebody else's, or one that is being made this moment.
    }
  }
}

/**
 * Makes and starts a cluster in the temporary folder that goes away when the command ends.
 * @param durable keeps fsync on, for measuring
 * @returns the superuser's URL of the maintenance database
 */
export async function startThrowAway({ durable = false } = {}) {
  await clearAbandoned();
  const folder = mkdtempSync(join(parentFolder(), prefix));
  const cluster = join(folder, 'cluster');
  onEnd(async () => {
    await stopCluster(cluster, 'immediate');
    rmSync(folder, { recursive: true, force: true });
  });
  chmodSync(folder, 0o711);
  writeFileSync(
    join(folder, 'owner.json'),
    JSON.stringify({ ...identify(process.pid), uid: process.getuid?.() }),
  );
  const password = makePassword();
  const room = ['max_connections = 400', 'shared_buffers = 256MB'];
  await createCluster(cluster, password, durable ? room : [...room, ...careless], ['--no-sync']);
  const { port } = await startCluster(cluster, { password });
  return urlOf({ port, user: superuser, password, database: 'postgres' });
}
