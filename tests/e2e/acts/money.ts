import type { Page } from 'playwright-core';
import { amount, choose, dialogOf, plain, told } from './page.ts';

/** Records what a member paid for a buy by transfer; the amount is the one that the dialog asks for. */
export async function recordPayment(page: Page, club: string, from: string, buyName: string) {
  await page.goto(`/c/${club}/ledger`);
  await page.getByRole('button', { name: 'Record a payment', exact: true }).click();
  const dialog = dialogOf(page);
  await choose(dialog, 'From', new RegExp(from), from);
  await choose(dialog, 'For', new RegExp(buyName));
  const paid = await dialog.getByLabel('Amount').inputValue();
  await dialog.getByRole('button', { name: 'Record it' }).click();
  await told(page, `from ${from} is in the books`);
  return Math.round(Number(paid) * 100);
}

/** The balance at the head of one's own statement, in minor units. */
export async function readBalance(page: Page, club: string): Promise<number> {
  await page.goto(`/c/${club}/ledger/mine`);
  const newest = page
    .getByRole('table', { name: /Entries/ })
    .getByRole('row')
    .nth(1);
  const said = plain(await newest.getByRole('cell').last().innerText()).replace('−', '-');
  return Math.round(Number(said) * 100);
}

/** Gives one's word for a member who hasn't paid. */
export async function vouchFor(page: Page, name: string, reason: string) {
  await page.getByRole('button', { name: `Acts for ${name}` }).click();
  await page.getByText(`Vouch for ${name}`).click();
  const dialog = dialogOf(page);
  await dialog.getByLabel('Why').fill(reason);
  await dialog.getByRole('button', { name: 'Vouch', exact: true }).click();
  await told(page, `You vouch for ${name}`);
}

/** Places the order with a supplier, as done by telephone. */
export async function placeOrder(page: Page, supplier: string) {
  const card = page.getByRole('region', { name: `Order from ${supplier}` });
  await card.getByRole('button', { name: 'Place the order' }).click();
  await dialogOf(page).getByRole('button', { name: 'It is ordered' }).click();
  await told(page, `The order with ${supplier} is placed`);
}

/** Enters a supplier's bill; `goods` are the amounts that differ from the order, by pack. */
export async function enterBill(page: Page, number: string, goods: Record<string, number>) {
  await page.getByRole('button', { name: 'Enter a bill' }).click();
  const dialog = dialogOf(page);
  await dialog.getByLabel('Bill number').fill(number);
  const rows = dialog.getByRole('group', { name: /^Goods/ }).getByLabel('For all of them');
  const packs = dialog.getByLabel(/^Packs of/);
  for (const [pack, minor] of Object.entries(goods)) {
    const labels = await packs.evaluateAll((fields) =>
      fields.map((field) => field.getAttribute('aria-label') ?? ''),
    );
    const place = labels.findIndex((label) => plain(label).includes(pack));
    await rows.nth(place).fill(amount(minor));
  }
  await dialog.getByRole('button', { name: 'Enter the bill' }).click();
  await told(page, 'The bill is entered');
}
