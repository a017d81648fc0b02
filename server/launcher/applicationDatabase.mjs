import { onEnd } from './command.mjs';
import { claimDataFolder, makeDataFolder } from './dataFolderLock.mjs';
import { startPrivateCluster, stopPrivateCluster } from './postgres/privateCluster.mjs';
import { dataFolder } from './project.mjs';
import { step } from './steps.mjs';

/**
 * The database of an installation until the command ends: DATABASE_URL's, or else the data folder's own PostgreSQL,
 * for which the folder is claimed.
 * @param command as it is typed
 * @param prepare is given the Debian packages needed; runs once the folder is claimed
 * @returns `{ url, lock }`, with no lock for an outside database, which several processes may share
 */
export async function openDatabase(command, prepare) {
  const outside = process.env.DATABASE_URL;
  if (outside) {
    makeDataFolder(dataFolder);
    await prepare([]);
    return { url: outside, lock: null };
  }
  const lock = await claimDataFolder(dataFolder, command);
  await prepare(['postgresql']);
  onEnd(() => stopPrivateCluster(dataFolder));
  let cluster;
  await step('Starting PostgreSQL', async () => {
    cluster = await startPrivateCluster(dataFolder);
    return cluster.reused ? 'it was still running' : 'done';
  });
  return { url: cluster.url, ownerUrl: cluster.ownerUrl, lock };
}
