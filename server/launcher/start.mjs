// `npm start`: from a fresh clone to a running Tarewell, with its own PostgreSQL.
import { openDatabase } from './applicationDatabase.mjs';
import { isEnding, runCommand } from './command.mjs';
import { exitCode, identify } from './processes.mjs';
import { dataFolder } from './project.mjs';
import { choosePort, host, startServer } from './serverProcess.mjs';
import { setUp } from './setUp.mjs';
import { say } from './steps.mjs';

await runCommand(async () => {
  const { url, lock } = await openDatabase('npm start', (debian) => setUp({ debian }));
  const port = await choosePort();
  const server = startServer({
    DATABASE_URL: url,
    HOST: host,
    PORT: String(port),
    TAREWELL_DATA: dataFolder,
  });
  lock?.note({ children: [identify(server.pid)], url: `http://${host}:${port}` });
  const code = await exitCode(server);
  if (!isEnding()) say(`The server ended by itself (code ${code}).`);
  return code || 1;
});
