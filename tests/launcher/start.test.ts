import { chmodSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { afterAll, expect, it } from 'vitest';
import { runToEnd, start } from './launcher.ts';

/** Root's PostgreSQL, which runs as another account, can enter it, so that its files go with it. */
function makeFolder() {
  const folder = mkdtempSync(path.join(tmpdir(), 'tarewell-start-'));
  chmodSync(folder, 0o711);
  return folder;
}

const data = makeFolder();
afterAll(() => rmSync(data, { recursive: true, force: true }));

const env = { TAREWELL_DATA: data, TAREWELL_DEMO: '0', LOG_LEVEL: 'warn' };
const ready = /Tarewell is ready at (http:\S+)\n/;

async function startReady() {
  const command = await start('start.mjs', env);
  await command.until(ready);
  return { command, url: ready.exec(command.printed())?.[1] ?? '' };
}

const isUp = (url: string) =>
  fetch(`${url}/readyz`).then(
    ({ ok }) => ok,
    () => false,
  );

/** Processes, of whatever kind, that speak of the data folder. */
const ours = () =>
  readdirSync('/proc').filter((pid) => {
    try {
      return (
        /^\d+$/.test(pid) &&
        readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes(`${data}/postgres`)
      );
    } catch {
      return false;
    }
  });

it('starts, says who has the folder, survives being killed, keeps its data, stops wholly', async () => {
  const first = await startReady();
  expect(await isUp(first.url)).toBe(true);
  const secret = readFileSync(path.join(data, 'session-secret'), 'utf8');

  const second = await runToEnd('start.mjs', env);
  expect(second.code).toBe(1);
  expect(second.output).toContain(
    `in use by "npm start" (process ${first.command.child.pid}, ${first.url})`,
  );

  first.command.child.kill('SIGKILL');
  await first.command.ended;
  const again = await startReady();
  expect(again.command.printed()).toContain('it was still running');
  expect(await isUp(again.url)).toBe(true);
  expect(readFileSync(path.join(data, 'session-secret'), 'utf8')).toBe(secret);

  again.command.child.kill('SIGINT');
  expect(await again.command.ended).toBe(130);
  expect(await isUp(again.url)).toBe(false);
  await pause(100);
  expect(ours()).toEqual([]);
});

it('takes the port that it is told, or says that it is taken', async () => {
  const first = await startReady();
  const { port } = new URL(first.url);
  const other = makeFolder();
  const { code, output } = await runToEnd('start.mjs', {
    ...env,
    TAREWELL_DATA: other,
    PORT: port,
  });
  first.command.child.kill('SIGTERM');
  expect(await first.command.ended).toBe(143);
  rmSync(other, { recursive: true, force: true });
  expect(output).toContain(`Port ${port} on 127.0.0.1 is taken or not allowed.`);
  expect(code).toBe(1);
});
