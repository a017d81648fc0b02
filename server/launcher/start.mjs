// `npm start`: from a fresh clone to a running Tarewell, with its own PostgreSQL.
import { end, onEnd, runCommand } from './command.mjs';
import { claimDataFolder, makeDataFolder } from './dataFolderLock.mjs';
import { startPrivateCluster, stopPrivateCluster } from './postgres/privateCluster.mjs';
import { exitCode, identify } from './processes.mjs';
import { dataFolder } from './project.mjs';
import { choosePort, host, startServer } from './serverProcess.mjs';
import { setUp } from './setUp.mjs';
import { say, step } from './steps.mjs';

async function startDatabase() {
  onEnd(() => stopPrivateCluster(dataFolder));
  let url;
  await step('Starting PostgreSQL', async () => {
    const cluster = await startPrivateCluster(dataFolder);
    url = cluster.url;
    return cluster.reused ? 'it was still running' : 'done';
  });
  return url;
}

await runCommand(async () => {
  const outside = process.env.DATABASE_URL;
  // Several processes may share an outside database, so only a private one makes the folder exclusive.
  const lock = outside ? null : await claimDataFolder(dataFolder, 'npm start');
  makeDataFolder(dataFolder);
  await setUp({ debian: outside ? [] : ['postgresql'] });
  const databaseUrl = outside ?? (await startDatabase());
  const port = await choosePort();
  const server = startServer({
    DATABASE_URL: databaseUrl,
    HOST: host,
    PORT: String(port),
    TAREWELL_DATA: dataFolder,
  });
  lock?.note({ server: identify(server.pid), url: `http://${host}:${port}` });
  const code = await exitCode(server);
  say(`The server ended by itself (code ${code}).`);
  await end(code || 1);
});
