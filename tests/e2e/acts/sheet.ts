import type { Page } from 'playwright-core';
import type { SheetReply } from '#shared/schemas/sheet.ts';
import type { Person } from '#tests/support/instance.ts';
import { dialogOf, saying, textOf } from './page.ts';

/** One's own row on the sheet. */
export const ownRow = (page: Page) =>
  page.getByRole('row').filter({ has: page.getByRole('rowheader', { name: 'You', exact: true }) });

/** One's own cell of a salt, for as long as it isn't edited. */
export const ownCell = (page: Page, salt: string) =>
  ownRow(page).getByRole('gridcell', { name: new RegExp(`, ${salt}: `) });

/** A cell that says how much somebody wants of a salt, maybe with what follows ("up to"). */
export const cellSaying = (page: Page, name: string, salt: string, mass: string) =>
  page.getByRole('gridcell', { name: saying(`${name}, ${salt}: ${mass}`) });

/** Types into one's own cell of a salt, as one does who never touches the mouse. */
export async function typeInto(page: Page, salt: string, text: string) {
  await ownCell(page, salt).focus();
  await page.keyboard.type(text, { delay: 30 });
}

/** Reads the cautions of a classified salt and confirms them. */
export async function confirmCautions(page: Page, salt: string) {
  const dialog = dialogOf(page);
  await dialog.getByRole('heading', { name: `Before you pledge ${salt}` }).waitFor();
  await dialog.getByRole('checkbox', { name: /I have read this/ }).click();
  await dialog.getByRole('button', { name: 'Confirm and pledge' }).click();
  await dialog.waitFor({ state: 'hidden' });
}

/** What the slip beside the sheet says. */
export const readSlip = (page: Page) =>
  textOf(page.getByRole('region', { name: /^Your share/ }).first());

/** The sheet as the server sends it to somebody. */
export async function fetchSheet(person: Person, path: string): Promise<SheetReply> {
  const reply = await person.context.request.get(`/api/v1/clubs/${path}/sheet`);
  return (await reply.json()) as SheetReply;
}

/** Locks the buy by the organiser's tools. */
export async function lockBuy(page: Page, name: string) {
  await page.getByRole('button', { name: 'Organise', exact: true }).click();
  await page.getByText('Lock now').click();
  await dialogOf(page)
    .getByRole('button', { name: `Lock ${name}` })
    .click();
}
