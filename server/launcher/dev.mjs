// `npm run dev`: the server restarts and the browser reloads when a file changes.
import { spawn } from 'node:child_process';
import { onEnd, runCommand } from './command.mjs';
import { openDatabase } from './applicationDatabase.mjs';
import { findFreePortFrom } from './ports.mjs';
import { endGroup, exitCode, identify } from './processes.mjs';
import { dataFolder, inProject, projectFolder } from './project.mjs';
import { host } from './serverProcess.mjs';
import { setUp } from './setUp.mjs';

function startInGroup(args, env, stopSignal) {
  const child = spawn(process.execPath, args, {
    cwd: projectFolder,
    detached: true,
    stdio: ['ignore', 'inherit', 'inherit'],
    env: { ...process.env, NODE_ENV: 'development', ...env },
  });
  onEnd(() => endGroup(child, { signal: stopSignal, patienceMs: 5000 }));
  return child;
}

await runCommand(async () => {
  const { url, lock } = await openDatabase('npm run dev', (debian) =>
    setUp({ debian, build: false }),
  );
  const clientPort = Number(process.env.PORT) || (await findFreePortFrom(4680, host));
  const serverPort = await findFreePortFrom(clientPort + 1, host);
  const server = startInGroup(
    ['--watch', '--watch-preserve-output', '--import', 'tsx', 'server/main.ts'],
    {
      DATABASE_URL: url,
      HOST: host,
      PORT: String(serverPort),
      // Links in mails, and the line that says where to go, lead to the client that reloads.
      PUBLIC_URL: process.env.PUBLIC_URL ?? `http://${host}:${clientPort}`,
      TAREWELL_DATA: dataFolder,
    },
    'SIGTERM',
  );
  const client = startInGroup(
    [inProject('node_modules/@quasar/app-vite/bin/quasar.js'), 'dev'],
    {
      TAREWELL_DEV_API: `http://${host}:${serverPort}`,
      TAREWELL_DEV_PORT: String(clientPort),
    },
    // It does not end on SIGTERM.
    'SIGINT',
  );
  lock?.note({ children: [server, client].map(({ pid }) => identify(pid)) });
  return Promise.race([exitCode(server), exitCode(client)]);
});
