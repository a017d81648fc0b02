import { spawn } from 'node:child_process';
import { cpSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { load } from './launcher.ts';

interface Taken {
  lock?: { note(more: object): void; release(): void };
  left?: { pid: number; doing?: string } | null;
  holder?: { pid: number };
}
const { takeLock, findHolder } = await load<{
  takeLock(file: string, facts?: object): Promise<Taken>;
  findHolder(file: string): { pid: number } | null;
}>('ownerLock.mjs');
const { identify } = await load<{ identify(pid: number): object }>('processes.mjs');

let folder: string;
let file: string;
beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'tarewell-lock-'));
  file = path.join(folder, 'lock.json');
});
afterEach(() => rmSync(folder, { recursive: true }));

describe('a lock file', () => {
  it('is refused while its owner lives, and free after release', async () => {
    const first = await takeLock(file);
    expect((await takeLock(file)).holder?.pid).toBe(process.pid);
    first.lock?.release();
    expect((await takeLock(file)).lock).toBeDefined();
  });

  it('is taken over from a killed owner, with what that one noted', async () => {
    const other = spawn('sleep', ['60']);
    const gone = new Promise((resolve) => other.once('close', resolve));
    const pid = other.pid ?? 0;
    writeFileSync(file, JSON.stringify({ ...identify(pid), file, doing: 'sleep' }));
    expect(findHolder(file)?.pid).toBe(pid);
    other.kill('SIGKILL');
    await gone;
    const { lock, left } = await takeLock(file);
    expect(lock).toBeDefined();
    expect(left).toMatchObject({ pid, doing: 'sleep' });
  });

  it('does not take a later process with the same number for its owner', async () => {
    writeFileSync(file, JSON.stringify({ ...identify(process.pid), started: '1', file }));
    expect((await takeLock(file)).lock).toBeDefined();
  });

  it('means nothing in a copy of its folder', async () => {
    await takeLock(file);
    const copy = path.join(folder, 'copy.json');
    cpSync(file, copy);
    expect((await takeLock(copy)).lock).toBeDefined();
    expect(findHolder(file)?.pid).toBe(process.pid);
  });

  it('is taken over from a file that was cut off', async () => {
    writeFileSync(file, '{"pid":');
    expect((await takeLock(file)).lock).toBeDefined();
  });

  it('goes to one of many who find it stale', async () => {
    writeFileSync(file, JSON.stringify({ pid: 1, started: '0', command: 'gone', file }));
    const all = await Promise.all(Array.from({ length: 20 }, () => takeLock(file)));
    expect(all.filter(({ lock }) => lock)).toHaveLength(1);
    expect(JSON.parse(readFileSync(file, 'utf8'))).toMatchObject({ pid: process.pid });
  });
});
