const alphabet = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ';

/** Remainder by 97 of the number that ISO 11649 makes of a text: letters are 10 to 35. */
function mod97(text: string): number {
  let rest = 0;
  for (const mark of text) {
    const value = alphabet.indexOf(mark);
    rest = (rest * (value > 9 ? 100 : 10) + value) % 97;
  }
  return rest;
}

/**
 * An RF creditor reference (ISO 11649) of up to 21 letters and digits.
 *
 * @example creditorReference('539007547034') // 'RF18539007547034'
 */
export function creditorReference(body: string): string {
  const check = 98 - mod97(`${body}RF00`);
  return `RF${String(check).padStart(2, '0')}${body}`;
}

/** Whether a text, spaces aside, is an RF creditor reference with the right check digits. */
export function isCreditorReference(text: string): boolean {
  const plain = text.replace(/\s/g, '').toUpperCase();
  if (!/^RF\d{2}[0-9A-Z]{1,21}$/.test(plain)) return false;
  return mod97(plain.slice(4) + plain.slice(0, 4)) === 1;
}

function shorten(id: string): string {
  return Number.parseInt(id.replace(/-/g, '').slice(0, 10), 16)
    .toString(36)
    .toUpperCase()
    .padStart(8, '0');
}

/** The reference under which a member pays for a buy: the same each time it is asked for. */
export function paymentReference(buyId: string, membershipId: string): string {
  return creditorReference(shorten(buyId) + shorten(membershipId));
}

/** A reference in groups of four, as people copy it. */
export function groupReference(reference: string): string {
  return reference.replace(/(.{4})(?=.)/g, '$1 ');
}
