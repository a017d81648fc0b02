import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startInstance, type Instance, type Person } from '#tests/support/instance.ts';
import { amount, dialogOf, loadedAt, saying, textOf } from './acts/page.ts';
import { fetchSheet } from './acts/sheet.ts';

const club = 'quillmere';
const buyName = 'Winter salts 2026';
const epsom = 'Epsom salt';

let tarewell: Instance;
let pim: Person, noor: Person;
let path = '';
let pledgePath = '';

beforeAll(async () => {
  tarewell = await startInstance({ demo: true });
  const [buy] = await tarewell.query<{ id: string }>('select id from buys where name = $1', [
    buyName,
  ]);
  path = `${club}/buys/${buy?.id}`;
  pim = await tarewell.browse({ phone: true });
  noor = await tarewell.as('noor@quillmere.example');
});
afterAll(() => tarewell?.stop());

const card = () => pim.page.getByRole('article').filter({ hasText: epsom });
const own = () => card().getByRole('button', { name: /Write it exactly$/ });
const pooled = async () => /Pooled ([\d.]+ k?g)/.exec(await textOf(card()))?.[1];

/** Changes Noor's pledge of Epsom salt, from elsewhere. */
async function pledgeElsewhere(wantedMg: number) {
  const { context } = noor;
  const mine = (await (await context.request.get(`/api/v1/clubs/${path}/sheet/mine`)).json()) as {
    pledges: { lineId: string; membershipId: string; version: number }[];
  };
  const now = mine.pledges.find(({ lineId }) => pledgePath.includes(lineId));
  const reply = await context.request.put(`/api/v1${pledgePath}/${now?.membershipId}`, {
    data: { wantedMg, upToMg: null, version: now?.version ?? 0 },
    headers: { Origin: tarewell.url, 'Sec-Fetch-Site': 'same-origin' },
  });
  expect(reply.status()).toBe(200);
}

describe('a member with a phone', () => {
  it('signs in with one click and finds the open buy', async () => {
    const { page } = pim;
    await page.goto('/');
    await page.getByRole('combobox', { name: 'Someone else' }).click();
    await page.getByRole('option', { name: 'Pim Castellet' }).click();
    await page.getByRole('heading', { level: 1, name: 'Buys' }).waitFor();
    await page.getByRole('link', { name: new RegExp(buyName) }).click();
    await page.waitForURL(/\/sheet/);
    await card().waitFor();
    const sheet = await fetchSheet(noor, path);
    const line = sheet.terms.lines.find(({ salt }) => salt.name === epsom);
    pledgePath = `/clubs/${path}/lines/${line?.id}/pledges`;
  });

  it('pledges with the stepper and sees that it is saved', async () => {
    await card()
      .getByRole('button', { name: saying(`50 g more ${epsom}`) })
      .tap();
    await card()
      .getByRole('button', { name: saying(`50 g more ${epsom}`) })
      .tap();
    await card().getByText('Saved').waitFor();
    expect(await own().getAttribute('aria-label')).toMatch(saying(`${epsom}: 350 g`));
    await expect
      .poll(async () => {
        const { terms, members } = await fetchSheet(noor, path);
        const place = terms.lines.findIndex(({ salt }) => salt.name === epsom);
        const cells = members.find(({ name }) => name === 'Pim Castellet')?.pledges ?? [];
        return cells.find(([line]) => line === place)?.[1];
      })
      .toBe(350_000);
  });

  it('writes a pledge exactly, and is told of a slip of the finger beside the field', async () => {
    await own().tap();
    const dialog = dialogOf(pim.page);
    await dialog.getByLabel('Wanted').fill('1,200');
    await dialog.getByRole('group', { name: 'Which one' }).waitFor();
    await dialog.getByLabel('Wanted').fill('0,4 kg');
    await dialog.getByRole('button', { name: 'Keep' }).tap();
    await dialog.waitFor({ state: 'hidden' });
    await expect.poll(() => own().getAttribute('aria-label')).toMatch(saying(`${epsom}: 400 g`));
  });

  it('opens the slip from the foot of the screen, with its arithmetic', async () => {
    const { page } = pim;
    const bar = page.getByRole('button', { name: /^You would pay/ });
    const said = await textOf(bar);
    await bar.tap();
    const slip = dialogOf(page);
    await slip.getByRole('button', { name: 'Why this?' }).tap();
    const text = await textOf(slip);
    expect(text).toMatch(/400 g as asked for/);
    const total = /€\s?([\d.]+)/.exec(said)?.[1] ?? 'none';
    expect(text).toContain(total);
    expect(amount(Math.round(Number(total) * 100))).toBe(total);
    await slip.getByRole('button', { name: 'Close' }).tap();
    await slip.waitFor({ state: 'hidden' });
  });

  it('goes back by the back button, and comes again by a deep link', async () => {
    const { page } = pim;
    const sheet = page.url();
    await page.goBack();
    await page.getByRole('heading', { level: 1, name: 'Buys' }).waitFor();
    await page.goForward();
    await card().waitFor();
    await page.goto('about:blank');
    await page.goto(sheet);
    await card().waitFor();
    await page.getByRole('heading', { level: 1, name: buyName }).waitFor();
  });

  it('says when the network is gone, and catches up without a reload when it is back', async () => {
    const { page, context } = pim;
    const loaded = await loadedAt(page);
    const before = await pooled();
    await context.setOffline(true);
    await page.getByText('You are offline.').waitFor();
    await page.getByText('Not live.').waitFor();
    await pledgeElsewhere(2_500_000);
    expect(await pooled()).toBe(before);
    await context.setOffline(false);
    await page.getByText('You are offline.').waitFor({ state: 'detached' });
    await expect.poll(pooled, { timeout: 15_000 }).not.toBe(before);
    expect(await loadedAt(page)).toBe(loaded);
    await pledgeElsewhere(500_000);
    await expect.poll(pooled, { timeout: 5_000 }).toBe(before);
  });

  it('has nothing that scrolls sideways, and a quiet console', async () => {
    const wide = await pim.page.evaluate(
      () => document.documentElement.scrollWidth > document.documentElement.clientWidth,
    );
    expect(wide).toBe(false);
    const unasked = pim.complaints.filter((line) => !/WebSocket|ERR_INTERNET/.test(line));
    expect(unasked).toEqual([]);
  });
});
