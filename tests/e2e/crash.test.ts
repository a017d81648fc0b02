import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SheetReply } from '#shared/schemas/sheet.ts';
import { startInstance, type Instance, type Person } from '#tests/support/instance.ts';
import { Pledger } from '#tests/support/pledger.ts';
import { loadedAt } from './acts/page.ts';
import { cellSaying } from './acts/sheet.ts';

const buyName = 'Winter salts 2026';
const epsom = 'Epsom salt';
const keys = ['pim', 'sanna', 'ines', 'bram', 'hale'];
const enough = 40;

let tarewell: Instance;
let noor: Person;
let buyId = '';
let path = '';
let loaded = 0;
const pledgers: Pledger[] = [];

beforeAll(async () => {
  tarewell = await startInstance({ demo: true });
  const [buy] = await tarewell.query<{ id: string }>('select id from buys where name = $1', [
    buyName,
  ]);
  buyId = buy?.id ?? '';
  path = `/clubs/quillmere/buys/${buyId}`;
  noor = await tarewell.as('noor@quillmere.example');
  for (const key of keys) {
    pledgers.push(await Pledger.of(tarewell.url, `${key}@quillmere.example`, path, epsom));
  }
});
afterAll(() => tarewell?.stop());

const auditOf = async () => {
  const [row] = await tarewell.query<{ count: number }>(
    `select count(*)::int as count from audit_entries where buy_id = $1 and action like 'pledges.%'`,
    [buyId],
  );
  return row?.count ?? 0;
};
const sheetVersion = async () => {
  const [row] = await tarewell.query<{ version: number }>(
    'select sheet_version::int as version from buys where id = $1',
    [buyId],
  );
  return row?.version ?? 0;
};

describe('a server killed while people pledge', () => {
  it('has kept every pledge it answered for, none twice, once it is up again', async () => {
    await noor.page.goto(`/c/quillmere/buys/${buyId}/sheet`);
    await noor.page.getByRole('grid', { name: 'Buy sheet' }).waitFor();
    loaded = await loadedAt(noor.page);
    const before = { audit: await auditOf(), version: await sheetVersion() };

    const running = pledgers.map((pledger, index) => pledger.pledgeUntilCut(1000 * (index + 1)));
    await expect
      .poll(() => pledgers.reduce((sum, { kept }) => sum + kept.length, 0), { timeout: 60_000 })
      .toBeGreaterThan(enough);
    await tarewell.kill();
    await Promise.all(running);
    await noor.page.getByText('Not live.').waitFor();
    await tarewell.startAgain();

    let changes = 0;
    for (const { kept, lineId, membershipId, sentMg } of pledgers) {
      const rows = await tarewell.query<{ wanted: number; version: number }>(
        `select wanted_mg::int as wanted, version from pledges
         where line_id = $1 and membership_id = $2`,
        [lineId, membershipId],
      );
      expect(rows).toHaveLength(1);
      const [row] = rows;
      const last = kept.at(-1);
      // The one that was under way may have been kept too, without its answer.
      const unanswered = (row?.version ?? 0) - (last?.version ?? 0);
      expect([0, 1]).toContain(unanswered);
      expect(row?.wanted).toBe(unanswered === 1 ? sentMg : last?.wantedMg);
      expect(kept.map(({ version }) => version)).toEqual(
        kept.map((_, index) => (kept[0]?.version ?? 0) + index),
      );
      changes += kept.length + unanswered;
    }
    expect((await auditOf()) - before.audit).toBe(changes);
    expect((await sheetVersion()) - before.version).toBe(changes);
  });

  it('takes the next pledge of everybody, from where they were', async () => {
    for (const [index, pledger] of pledgers.entries()) {
      const status = await pledger.pledge(500_000 + index * 1000);
      // Who never heard the answer is told that the pledge changed meanwhile.
      expect([200, 409]).toContain(status);
    }
  });

  it('catches up with the plan, and the page that was open goes on without a reload', async () => {
    const [first] = pledgers;
    await expect
      .poll(
        async () => {
          const sheet = await first?.client.json<SheetReply>(`${path}/sheet`);
          return sheet?.plan?.forVersion === sheet?.sheetVersion;
        },
        { timeout: 20_000 },
      )
      .toBe(true);
    const { page } = noor;
    await page.getByText('Not live.').waitFor({ state: 'detached' });
    const sheet = await first?.client.json<SheetReply>(`${path}/sheet`);
    const line = sheet?.terms.lines.findIndex(({ salt }) => salt.name === epsom);
    await page.getByRole('button', { name: /more members/ }).click();
    for (const { membershipId } of pledgers) {
      const member = sheet?.members.find((one) => one.membershipId === membershipId);
      const grams = (member?.pledges.find(([place]) => place === line)?.[1] ?? 0) / 1000;
      await cellSaying(page, member?.name ?? '', epsom, `${grams} g`).waitFor();
    }
    expect(await loadedAt(page)).toBe(loaded);
  });
});
