import type { ShippingField, Supplier, SupplierBody } from '#shared/schemas/suppliers.ts';

/** A shipping table as it is filled in: all its kinds at once, so that changing the kind loses nothing. */
export type ShippingForm = {
  kind: ShippingField['kind'];
  minor: number | null;
  steps: { upTo: number | null; minor: number | null; endless: boolean }[];
};

export type SupplierForm = Omit<SupplierBody, 'shipping'> & { shipping: ShippingForm };

function shippingForm(shipping: ShippingField): ShippingForm {
  if (shipping.kind === 'flat') {
    return {
      kind: 'flat',
      minor: shipping.minor,
      steps: [
        { upTo: null, minor: null, endless: false },
        { upTo: null, minor: null, endless: true },
      ],
    };
  }
  return {
    kind: shipping.kind,
    minor: null,
    steps: shipping.steps.map(({ upTo, minor }) => ({ upTo, minor, endless: upTo === null })),
  };
}

/** A form for a supplier, empty or filled in from one. */
export function makeSupplierForm(supplier: Supplier | null): SupplierForm {
  return {
    name: supplier?.name ?? '',
    contact: supplier?.contact ?? '',
    email: supplier?.email ?? '',
    website: supplier?.website ?? '',
    note: supplier?.note ?? '',
    shipping: shippingForm(supplier?.shipping ?? { kind: 'flat', minor: 0 }),
    freeShippingFromMinor: supplier?.freeShippingFromMinor ?? null,
    minimumOrderMinor: supplier?.minimumOrderMinor ?? null,
  };
}

/**
 * What is missing in the form before the server is asked, by the paths it would use: numbers that weren't written, and
 * steps that don't rise.
 */
export function errorsOfSupplierForm(form: SupplierForm): Record<string, string> {
  const errors: Record<string, string> = {};
  if (form.name.trim() === '') errors.name = 'Write a name.';
  const { kind, minor, steps } = form.shipping;
  if (kind === 'flat') {
    if (minor === null) errors['shipping.minor'] = 'Write a price; 0 if it ships free.';
    return errors;
  }
  let reach = 0;
  steps.forEach((step, index) => {
    if (step.minor === null) errors[`shipping.steps.${index}.minor`] = 'Write a price.';
    if (step.endless) return;
    if (step.upTo === null) errors[`shipping.steps.${index}.upTo`] = 'Write how far it reaches.';
    else if (step.upTo <= reach) {
      errors[`shipping.steps.${index}.upTo`] = 'Each step must reach further than the one before.';
    } else reach = step.upTo;
  });
  return errors;
}

/** The form as it is sent; `errorsOfSupplierForm` has found nothing in it. */
export function bodyOfSupplierForm(form: SupplierForm): SupplierBody {
  const { kind, minor, steps } = form.shipping;
  const shipping: ShippingField =
    kind === 'flat'
      ? { kind, minor: minor ?? 0 }
      : {
          kind,
          steps: steps.map((step) => ({
            upTo: step.endless ? null : step.upTo,
            minor: step.minor ?? 0,
          })),
        };
  return { ...form, website: withScheme(form.website), shipping };
}

/** People write addresses without https://. */
export function withScheme(link: string): string {
  const text = link.trim();
  return text === '' || /^[a-z][a-z0-9+.-]*:/i.test(text) ? text : `https://${text}`;
}
