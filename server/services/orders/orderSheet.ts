import { stringify } from 'csv-stringify/sync';
import { formatMass } from '#shared/domain/mass/formatMass.ts';
import { minorToDecimal } from '#shared/domain/money/formatMoney.ts';
import type { SupplierOrder } from '#shared/schemas/orders.ts';
import { select } from '../../config/database.ts';
import { presentOrder } from '../../presenters/orders/presentOrder.ts';
import type { BuyActor } from '../actors.ts';
import { loadOrderBook, orderWith } from './orderBook.ts';
import { supplierContacts } from './supplierContacts.ts';

/** One supplier's order with how to reach them, for the order sheet. */
export async function readOrder(actor: BuyActor, supplierId: string): Promise<SupplierOrder> {
  const book = await loadOrderBook(actor.buy.id);
  const order = orderWith(book, supplierId);
  const contacts = await supplierContacts([supplierId]);
  return presentOrder(book, order, contacts.get(supplierId), false);
}

/** The order as CSV; a cell that a spreadsheet would run as a formula is made plain text. */
export async function orderCsv(
  actor: BuyActor,
  supplierId: string,
): Promise<{ fileName: string; csv: string }> {
  const order = await readOrder(actor, supplierId);
  const { currency } = actor.club;
  const money = (minor: number) => minorToDecimal(minor, currency);
  const [buy] = await select<{ name: string }>('select name from buys where id = :id', {
    id: actor.buy.id,
  });
  const rows = order.packs.map((pack) => [
    pack.salt,
    pack.formula ?? '',
    pack.label,
    formatMass(pack.packMg, { unit: 'auto' }).replace(/[\u00a0\u202f]/g, ' '),
    pack.packs,
    money(pack.priceMinor),
    money(pack.packs * pack.priceMinor),
  ]);
  const csv = stringify(
    [
      [
        'Salt',
        'Formula',
        'Article',
        'Pack',
        'Packs',
        `Price (${currency})`,
        `Amount (${currency})`,
      ],
      ...rows,
      ['Shipping', '', '', '', '', '', money(order.shippingMinor)],
      ['Total', '', '', '', '', '', money(order.totalMinor)],
    ],
    { bom: true, escape_formulas: true, record_delimiter: 'windows' },
  );
  const plain = `${buy?.name ?? 'order'} ${order.supplierName}`.replace(/[\\/:*?"<>|\s]+/g, ' ');
  return { fileName: `${plain.trim()}.csv`, csv };
}
