import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { load } from './launcher.ts';

const { summarise } = await load<{
  summarise(file: string, code: number): { line: string; remarks: string[]; ok: boolean };
}>('testSummary.mjs');

const folder = mkdtempSync(path.join(tmpdir(), 'tarewell-summary-'));
afterAll(() => rmSync(folder, { recursive: true }));

const suite = (...statuses: string[]) => ({
  name: 'a.test.ts',
  status: statuses.length === 0 || statuses.includes('failed') ? 'failed' : 'passed',
  message: 'Cannot find module\n  at a.test.ts',
  assertionResults: statuses.map((status) => ({ status })),
});

function count(suites: ReturnType<typeof suite>[], code: number) {
  const statuses = suites.flatMap(({ assertionResults }) => assertionResults);
  const of = (wanted: string) => statuses.filter(({ status }) => status === wanted).length;
  const file = path.join(folder, 'report.json');
  const numbers = { numPassedTests: of('passed'), numFailedTests: of('failed') };
  const skipped = { numPendingTests: of('skipped'), numTodoTests: 0 };
  writeFileSync(file, JSON.stringify({ ...numbers, ...skipped, testResults: suites }));
  return summarise(file, code);
}

describe('the last line of npm test', () => {
  it.each([
    ['all passed', [suite('passed', 'passed')], 0, '2 passed, 0 failed', true],
    ['one failed', [suite('passed', 'failed')], 1, '1 passed, 1 failed', false],
    ['skipped ones', [suite('passed', 'skipped')], 0, '1 passed, 0 failed, 1 skipped', true],
    ['a file that cannot load', [suite('passed'), suite()], 1, '1 passed, 1 failed', false],
    ['an error outside tests', [suite('passed')], 1, '1 passed, 1 failed', false],
    ['nothing run', [], 0, '0 passed, 1 failed', false],
    ['only skipped', [suite('skipped')], 0, '0 passed, 1 failed, 1 skipped', false],
  ])('counts %s', (_what, suites, code, line, ok) => {
    expect(count(suites, code)).toMatchObject({ line, ok });
  });

  it('names the file that could not load', () => {
    expect(count([suite()], 1).remarks).toEqual(['Could not run a.test.ts: Cannot find module']);
  });

  it('is a failure when vitest left no report', () => {
    expect(summarise(path.join(folder, 'none.json'), 0)).toMatchObject({
      line: '0 passed, 1 failed',
      ok: false,
    });
  });
});
