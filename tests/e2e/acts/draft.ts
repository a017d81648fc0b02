import type { Page } from 'playwright-core';
import { choose } from './page.ts';

/** Drafts a buy with a name and lines, from the list of buys; gives its id. */
export async function draftBuy(page: Page, club: string, name: string, salts: string[]) {
  await page.goto(`/c/${club}/buys`);
  await page.getByRole('button', { name: /New buy|Draft the first buy/ }).click();
  await page.waitForURL(/\/buys\/[\da-f-]{36}\/draft/);
  const id = /buys\/([\da-f-]{36})/.exec(page.url())?.[1] ?? '';
  const field = page.getByLabel('What the members call it');
  await field.fill(name);
  await field.press('Enter');
  await page.getByRole('heading', { level: 1, name }).waitFor();
  for (const salt of salts) {
    await choose(page, 'Add a salt', new RegExp(salt), salt);
    await page.getByRole('button', { name: `Take ${salt} out` }).waitFor();
  }
  return id;
}

/** Opens the draft on the page; it leads to the sheet. */
export async function openBuy(page: Page) {
  await page.getByRole('button', { name: 'Open the buy' }).click();
  await page.waitForURL(/\/sheet/);
}
