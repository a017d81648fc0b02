import type { Page } from 'playwright-core';
import { dialogOf, told } from './page.ts';

/** The pass that a member sees on their own pickup page. */
export async function readPass(page: Page): Promise<string> {
  const field = page.getByRole('textbox', { name: 'Pass' });
  await field.waitFor();
  return field.inputValue();
}

/** Tells all who wait, by mail with their pass, that they may come. */
export async function tellWaiting(page: Page) {
  await page.getByRole('tab', { name: 'Slots and reminders' }).click();
  await page.getByRole('button', { name: 'Tell everyone who has not collected' }).click();
  await dialogOf(page)
    .getByRole('button', { name: /^Tell \d/ })
    .click();
  await told(page, /^Told \d/);
  await page.getByRole('tab', { name: 'Hand over' }).click();
}

/** Finds somebody at the desk, by pass or by name. */
export async function findAtDesk(page: Page, typed: string) {
  const field = page.getByLabel('Name or pass');
  await field.fill(typed);
  if (!/\d/.test(typed)) await field.press('Enter');
  await dialogOf(page).waitFor();
  return dialogOf(page);
}

/** Hands all containers over, with the legal name that a reportable salt asks for. */
export async function handOver(page: Page, legalName: string) {
  const dialog = dialogOf(page);
  const act = dialog.getByRole('button', { name: /^Hand over \d containers?$/ });
  const before = await act.isEnabled();
  await dialog.getByLabel(/^Legal name of/).fill(legalName);
  await act.click();
  await told(page, /handed to/);
  await page.getByRole('dialog').waitFor({ state: 'hidden' });
  return { withoutLegalName: before };
}
