import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startInstance, type Instance } from '#tests/support/instance.ts';
import { signInByHttp } from '#tests/support/httpClient.ts';
import { Pledger } from '#tests/support/pledger.ts';
import { cellSaying } from './acts/sheet.ts';

const buyName = 'Winter salts 2026';
const epsom = 'Epsom salt';

let tarewell: Instance;
let other = '';
let buyId = '';

beforeAll(async () => {
  tarewell = await startInstance({ demo: true });
  other = await tarewell.startAnother();
  const [buy] = await tarewell.query<{ id: string }>('select id from buys where name = $1', [
    buyName,
  ]);
  buyId = buy?.id ?? '';
});
afterAll(() => tarewell?.stop());

const sheet = () => `/c/quillmere/buys/${buyId}/sheet`;
const email = (key: string) => `${key}@quillmere.example`;

describe('two processes on one database', () => {
  it('show on a page of one what was pledged through the other, and who looks at either', async () => {
    const noor = await tarewell.as(email('noor'));
    const sanna = await tarewell.as(email('sanna'), { url: other });
    await noor.page.goto(sheet());
    await sanna.page.goto(sheet());
    for (const { page } of [noor, sanna]) await page.getByText('2 looking now').waitFor();
    const path = `/clubs/quillmere/buys/${buyId}`;
    const bram = await Pledger.of(other, email('bram'), path, epsom);
    expect(await bram.pledge(1_110_000)).toBe(200);
    for (const { page } of [noor, sanna]) {
      await cellSaying(page, 'Bram Oostergaard', epsom, '1110 g').waitFor();
    }
    await sanna.context.close();
    await noor.page.getByText('2 looking now').waitFor({ state: 'detached' });
    expect(noor.complaints).toEqual([]);
    await noor.context.close();
  });

  it('sign out everywhere through one hangs up the sockets of the other', async () => {
    const pim = await tarewell.as(email('pim'));
    await pim.page.goto(sheet());
    await pim.page.getByRole('grid', { name: 'Buy sheet' }).waitFor();
    const elsewhere = await signInByHttp(other, email('pim'));
    expect((await elsewhere.call('DELETE', '/account/sessions')).status).toBe(200);
    await pim.page.waitForURL(/\/sign-in/, { timeout: 10_000 });
    expect((await pim.context.request.get('/api/v1/account')).status()).toBe(401);
    await pim.context.close();
  });

  it('lock a buy once when its time has come, and tell both', async () => {
    const here = await tarewell.as(email('noor'));
    const there = await tarewell.as(email('sanna'), { url: other });
    for (const { page } of [here, there]) {
      await page.goto(sheet());
      await page.getByRole('grid', { name: 'Buy sheet' }).waitFor();
    }
    await tarewell.query(
      `update buys set closes_at = clock_timestamp() + interval '1 second' where id = $1`,
      [buyId],
    );
    for (const { page } of [here, there]) await page.getByText('Locked, now').waitFor();
    const count = async (sql: string) =>
      (await tarewell.query<{ count: number }>(sql, [buyId]))[0]?.count;
    expect(
      await count(`select count(*)::int from snapshots where buy_id = $1 and kind = 'estimate'`),
    ).toBe(1);
    expect(
      await count(
        `select count(*)::int from audit_entries where buy_id = $1 and action = 'buys.lock'`,
      ),
    ).toBe(1);
    const mails = await count(
      `select count(*)::int from outbox where buy_id = $1 and kind = 'locked'`,
    );
    expect(mails).toBeGreaterThan(10);
    expect(mails).toBe(
      await count(
        `select count(distinct address)::int as count from outbox where buy_id = $1 and kind = 'locked'`,
      ),
    );
  });
});
