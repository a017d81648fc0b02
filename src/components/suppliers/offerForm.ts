import { grossPriceMinor } from '#shared/domain/salts/grossPrice.ts';
import type { Offer, OfferBody } from '#shared/schemas/suppliers.ts';
import { withScheme } from 'src/components/suppliers/supplierForm.ts';

/** An offer as it is filled in: numbers may still be missing. */
export type OfferForm = Omit<OfferBody, 'packMg' | 'priceMinor' | 'taxRatePpm' | 'multipleOf'> & {
  packMg: number | null;
  priceMinor: number | null;
  taxRatePpm: number | null;
  multipleOf: number | null;
};

/** A form for an offer: filled in from one, or empty with the tax of the supplier's newest offer. */
export function makeOfferForm(offer: Offer | null, like: Offer | null = null): OfferForm {
  return {
    saltId: offer?.saltId ?? '',
    label: offer?.label ?? '',
    packMg: offer?.packMg ?? null,
    priceMinor: offer?.priceMinor ?? null,
    priceIncludesTax: (offer ?? like)?.priceIncludesTax ?? true,
    taxRatePpm: (offer ?? like)?.taxRatePpm ?? 0,
    stockPacks: offer?.stockPacks ?? null,
    multipleOf: offer?.multipleOf ?? 1,
    link: offer?.link ?? '',
  };
}

/** What is missing before the server is asked. */
export function errorsOfOfferForm(form: OfferForm): Record<string, string> {
  const errors: Record<string, string> = {};
  if (form.saltId === '') errors.saltId = 'Choose a salt.';
  if (form.packMg === null || form.packMg === 0) errors.packMg = 'Write the size of one pack.';
  if (form.priceMinor === null) errors.priceMinor = 'Write the price of one pack.';
  return errors;
}

/** The form as it is sent; `errorsOfOfferForm` has found nothing in it. */
export function bodyOfOfferForm(form: OfferForm): OfferBody {
  return {
    ...form,
    packMg: form.packMg ?? 0,
    priceMinor: form.priceMinor ?? 0,
    taxRatePpm: form.taxRatePpm ?? 0,
    multipleOf: form.multipleOf ?? 1,
    link: withScheme(form.link),
  };
}

/** Minor units a gram, tax included; null while something is missing. For display alone. */
export function pricePerGram(
  offer: Pick<OfferForm, 'packMg' | 'priceMinor' | 'priceIncludesTax' | 'taxRatePpm'>,
): number | null {
  const { packMg, priceMinor, priceIncludesTax, taxRatePpm } = offer;
  if (!packMg || priceMinor === null) return null;
  const gross = grossPriceMinor({ priceMinor, priceIncludesTax, taxRatePpm: taxRatePpm ?? 0 });
  return (gross * 1000) / packMg;
}
