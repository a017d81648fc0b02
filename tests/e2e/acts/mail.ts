import type { Page } from 'playwright-core';
import { plain } from './page.ts';

/** Finds a mail to somebody in the outbox, in a browser, and reads it. */
export async function readMail(page: Page, to: string, subject: RegExp): Promise<string> {
  await page.goto('/outbox');
  const title = page.getByRole('button', { name: subject }).filter({ hasText: to }).first();
  await page.getByLabel('Find by person or subject').fill(to);
  await title.click();
  const frame = page.frameLocator('iframe');
  await frame.locator('body').waitFor();
  return plain(await frame.locator('body').innerText());
}
