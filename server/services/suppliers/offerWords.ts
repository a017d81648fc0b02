import { formatMass } from '#shared/domain/mass/formatMass.ts';
import { formatMoney } from '#shared/domain/money/formatMoney.ts';
import type { OfferBody, SupplierBody } from '#shared/schemas/suppliers.ts';

type Club = { currency: string; locale: string };
type Terms = Omit<OfferBody, 'link'>;

/** "25 kg potassium nitrate at Brook & Stone". */
function nameOffer(offer: Terms, saltName: string, supplierName: string, club: Club): string {
  const pack = formatMass(offer.packMg, { unit: 'auto', locale: club.locale });
  const label = offer.label === '' ? '' : ` (${offer.label})`;
  return `${pack} ${saltName.charAt(0).toLowerCase()}${saltName.slice(1)}${label} at ${supplierName}`;
}

function priceWords(offer: Terms, club: Club): string {
  const price = formatMoney(offer.priceMinor, club.currency, club.locale);
  if (offer.priceIncludesTax || offer.taxRatePpm === 0) return price;
  return `${price} plus ${offer.taxRatePpm / 10_000} % tax`;
}

const stockWords = (packs: number | null) =>
  packs === null ? 'no limit' : `${packs} ${packs === 1 ? 'pack' : 'packs'}`;

/**
 * What changed in an offer for who pledged on it, one sentence a change; empty when nothing did that they pay or get.
 *
 * @param before null for a new offer
 * @param after null for one that is no longer offered
 */
export function describeOfferChange(
  before: Terms | null,
  after: Terms | null,
  names: { salt: string; supplier: string },
  club: Club,
): string[] {
  const offer = after ?? before;
  if (!offer) return [];
  const name = nameOffer(offer, names.salt, names.supplier, club);
  if (!before) return [`New: ${name} for ${priceWords(offer, club)}.`];
  if (!after) return [`${name} is no longer offered.`];
  const said: string[] = [];
  const [was, now] = [priceWords(before, club), priceWords(after, club)];
  if (was !== now) {
    const rise = after.priceMinor - before.priceMinor;
    const verb = rise > 0 ? 'rose' : rise < 0 ? 'fell' : 'changed';
    said.push(`Price of ${name} ${verb} from ${was} to ${now}.`);
  } else if (before.taxRatePpm !== after.taxRatePpm) {
    const [from, to] = [before.taxRatePpm / 10_000, after.taxRatePpm / 10_000];
    said.push(`Tax in the price of ${name} changed from ${from} % to ${to} %.`);
  }
  if (before.packMg !== after.packMg) {
    const size = formatMass(before.packMg, { unit: 'auto', locale: club.locale });
    said.push(`The pack of ${name} was ${size} before.`);
  }
  if (before.stockPacks !== after.stockPacks) {
    const [from, to] = [stockWords(before.stockPacks), stockWords(after.stockPacks)];
    said.push(`Stock of ${name} changed from ${from} to ${to}.`);
  }
  if (before.multipleOf !== after.multipleOf) {
    said.push(`${name} now comes in multiples of ${after.multipleOf}.`);
  }
  return said;
}

/** What changed in a supplier's terms for who pledged, one sentence a change. */
export function describeSupplierChange(
  before: SupplierBody,
  after: SupplierBody,
  club: Club,
): string[] {
  const money = (minor: number | null) =>
    minor === null ? 'none' : formatMoney(minor, club.currency, club.locale);
  const said: string[] = [];
  if (JSON.stringify(before.shipping) !== JSON.stringify(after.shipping)) {
    const flat = before.shipping.kind === 'flat' && after.shipping.kind === 'flat';
    said.push(
      flat && before.shipping.kind === 'flat' && after.shipping.kind === 'flat'
        ? `Shipping from ${after.name} changed from ${money(before.shipping.minor)} to ${money(after.shipping.minor)}.`
        : `The shipping table of ${after.name} changed.`,
    );
  }
  if (before.freeShippingFromMinor !== after.freeShippingFromMinor) {
    const [from, to] = [money(before.freeShippingFromMinor), money(after.freeShippingFromMinor)];
    said.push(`The value from which ${after.name} ships free changed from ${from} to ${to}.`);
  }
  if (before.minimumOrderMinor !== after.minimumOrderMinor) {
    const [from, to] = [money(before.minimumOrderMinor), money(after.minimumOrderMinor)];
    said.push(`The minimum order at ${after.name} changed from ${from} to ${to}.`);
  }
  return said;
}
