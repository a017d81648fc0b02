import type { Locator, Page } from 'playwright-core';

/** Text as a person reads it: one space between words, none within a number. */
export const plain = (text: string) =>
  text
    .replace(/\u202f/g, '')
    .replace(/\s+/g, ' ')
    .trim();

/** What a part of a page says. */
export const textOf = async (part: Locator) => plain(await part.innerText());

/** Matches a name whatever kind of space parts its words and its thousands. */
export const saying = (text: string, { whole = false } = {}) => {
  const words = text
    .replace(/[.*+?^${}()|[\]\\]/g, '\\$&')
    .replace(/(?<=\d)(?=(?:\d{3})+(?!\d))/g, '\\s?')
    .replace(/ /g, '\\s');
  return new RegExp(whole ? `^${words}$` : words);
};

/** Minor units as pages write them, without the currency's sign. */
export const amount = (minor: number) => (minor / 100).toFixed(2);

/** Whole grams of a number of milligrams. */
export const grams = (mg: number) => String(mg / 1000);

/** When this page was loaded: the same number as long as it isn't loaded again. */
export const loadedAt = (page: Page) => page.evaluate(() => performance.timeOrigin);

/** The dialog that is open. */
export const dialogOf = (page: Page) => page.getByRole('dialog').last();

/** Waits until what a notification says has been said. */
export const told = (page: Page, text: string | RegExp) =>
  page.locator('.q-notification').filter({ hasText: text }).last().waitFor();

/** Chooses an option of a select by its label. */
export async function choose(
  within: Page | Locator,
  label: string,
  option: string | RegExp,
  typed = '',
) {
  const field = within.getByRole('combobox', { name: label });
  await field.click();
  if (typed) await field.fill(typed);
  const page = 'page' in within ? within.page() : within;
  await page.getByRole('option', { name: option }).first().click();
}
