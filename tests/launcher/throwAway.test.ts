import { existsSync } from 'node:fs';
import pg from 'pg';
import { expect, it } from 'vitest';
import { start } from './launcher.ts';

async function askFolder(url: string): Promise<string> {
  const client = new pg.Client(url);
  await client.connect();
  const { rows } = await client.query<{ data_directory: string }>('show data_directory');
  await client.end();
  return rows[0]?.data_directory ?? '';
}

const startOne = async () => {
  const command = await start('testDatabase.mjs', {});
  await command.until(/^postgresql:.*\n/m);
  const url = /^postgresql:.*$/m.exec(command.printed())?.[0] ?? '';
  return { command, url, folder: await askFolder(url) };
};

it('a throw-away database goes when it is stopped, and the next one clears a killed one', async () => {
  const killed = await startOne();
  killed.command.child.kill('SIGKILL');
  await killed.command.ended;
  expect(await askFolder(killed.url)).toBe(killed.folder);

  const next = await startOne();
  expect(existsSync(killed.folder)).toBe(false);
  await expect(askFolder(killed.url)).rejects.toThrow();

  next.command.child.kill('SIGTERM');
  expect(await next.command.ended).toBe(143);
  expect(existsSync(next.folder)).toBe(false);
  await expect(askFolder(next.url)).rejects.toThrow();
});
