/** What a mail to a supplier says, and to whom. */
export interface OrderMail {
  readonly to: string;
  readonly subject: string;
  readonly body: string;
}

/**
 * A draft of the mail that places an order: packs by name and size, prices as expected, how to answer. Sums come
 * already written, so that the draft reads as the club writes.
 */
export function orderMail(order: {
  to: string;
  supplier: string;
  club: string;
  buy: string;
  organiser: string;
  reference: string;
  packs: readonly { packs: number; pack: string; salt: string; label: string; price: string }[];
  shipping: string;
  total: string;
}): OrderMail {
  const rows = order.packs.map(({ packs, pack, salt, label, price }) => {
    const article = label === '' ? salt : `${salt} (${label})`;
    return `  ${packs} x ${pack} ${article} at ${price}`;
  });
  const lines = [
    `Dear ${order.supplier},`,
    '',
    `${order.club} would like to order${order.reference === '' ? '' : ` (your reference ${order.reference})`}:`,
    '',
    ...rows,
    '',
    `Shipping as you told us: ${order.shipping}`,
    `In all: ${order.total}`,
    '',
    'Please confirm the prices and when it will arrive, and send the bill and the safety data sheets with it.',
    'If anything differs, write before you send it.',
    '',
    'Kind regards',
    order.organiser,
    order.club,
  ];
  return { to: order.to, subject: `Order of ${order.club}: ${order.buy}`, body: lines.join('\n') };
}

/** The mail as a link that opens the reader's own mail program. */
export function mailtoLink({ to, subject, body }: OrderMail): string {
  const encode = (text: string) => encodeURIComponent(text.replace(/\r?\n/g, '\r\n'));
  return `mailto:${encodeURIComponent(to).replace(/%40/g, '@')}?subject=${encode(subject)}&body=${encode(body)}`;
}
