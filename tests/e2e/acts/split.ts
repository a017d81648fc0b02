import type { Page } from 'playwright-core';
import { choose, dialogOf } from './page.ts';

/** Counts what came of an order: complete. */
export async function receiveOrder(page: Page, supplier: string) {
  const card = page.getByRole('region', { name: `Order from ${supplier}` });
  await card.getByRole('button', { name: 'It has come, complete' }).click();
  await card.getByText('Complete', { exact: true }).waitFor();
}

/** Weighs a salt's only bag. */
export async function weighBag(
  page: Page,
  salt: string,
  bag: { gross: string; tare: string; lot: string },
) {
  const card = page
    .locator('section')
    .filter({ has: page.getByRole('heading', { level: 3, name: salt, exact: true }) })
    .last();
  const row = card.getByRole('listitem').filter({ hasText: 'Bag' });
  await row.getByLabel('Gross').fill(bag.gross);
  await row.getByLabel('Empty bag').fill(bag.tare);
  await row.getByLabel('Lot').fill(bag.lot);
  await row.getByLabel('Lot').press('Enter');
  await row.getByText('Saved').waitFor();
}

/** Says which scale this device stands beside. */
export async function setScale(page: Page, name: string, division: string, capacity: string) {
  const bar = page.getByRole('region', { name: 'Your scale' });
  await bar.getByLabel('Station').fill(name);
  await bar.getByLabel('Most it carries').fill(capacity);
  await bar.getByLabel('Smallest step it shows').fill(division);
  await bar.getByLabel('Smallest step it shows').press('Enter');
}

/** Puts somebody's portion of a salt on the scale. */
export async function takePortion(page: Page, salt: string, name: string) {
  const list = page.getByRole('region', { name: 'To weigh' });
  await choose(list, 'Salt', new RegExp(salt));
  await list.getByRole('button', { name: new RegExp(name) }).click();
  await page.getByRole('region', { name: 'On the scale' }).getByRole('heading', { name }).waitFor();
}

/** Types what the scale shows; gives the button that would keep it. */
export async function readScale(page: Page, reading: string) {
  const panel = page.getByRole('region', { name: 'On the scale' });
  await panel.getByLabel('Scale shows').fill(reading);
  return panel.getByRole('button', { name: /^(Keep|I looked)/ });
}

/** Waits until the list says that somebody's portion of the salt at hand is weighed. */
export const seeWeighed = (page: Page, name: string) =>
  page
    .getByRole('region', { name: 'To weigh' })
    .getByRole('button', { name: new RegExp(`${name}.*done`) })
    .waitFor();

/** Weighs a portion within its band. */
export async function weigh(page: Page, salt: string, name: string, reading: string) {
  await takePortion(page, salt, name);
  await (await readScale(page, reading)).click();
  await seeWeighed(page, name);
}

/** Closes a salt's only bag with what is left in it. */
export async function closeBag(page: Page, salt: string, left: string) {
  const card = page
    .locator('section')
    .filter({ has: page.getByRole('heading', { level: 3, name: salt, exact: true }) })
    .last();
  await card.getByRole('button', { name: 'Close it' }).click();
  await card.getByLabel('Left in the bag').fill(left);
  await card.getByRole('button', { name: 'Close this bag' }).click();
  await card.getByText('Closed', { exact: true }).waitFor();
}

/** Posts the final shares, once. */
export async function postShares(page: Page) {
  await page.getByRole('button', { name: 'Post the final shares' }).click();
  await dialogOf(page).getByRole('button', { name: 'Post the final shares' }).click();
  await page.waitForURL(/\/pickup/);
}
