/**
 * What a member writes on a transfer so that the treasurer can tell whose it is and for which buy.
 *
 * @example paymentReference('3f2b9c1e-…', '77aa01bc-…') // 'TW-3F2B-77AA01'
 */
export function paymentReference(buyId: string, membershipId: string): string {
  const plain = (id: string) => id.replaceAll('-', '').toUpperCase();
  return `TW-${plain(buyId).slice(0, 4)}-${plain(membershipId).slice(0, 6)}`;
}
