import type { ShippingField } from '#shared/schemas/suppliers.ts';

type Words = { money: (minor: number) => string; pack: (mg: number) => string };

/** The steps of a shipping table in words, each with what it costs. */
export function shippingRows(
  shipping: ShippingField,
  words: Words,
): { reach: string; minor: number }[] {
  if (shipping.kind === 'flat') return [{ reach: 'Any order', minor: shipping.minor }];
  const { kind, steps } = shipping;
  const say = kind === 'byMass' ? words.pack : words.money;
  return steps.map(({ upTo, minor }, index) => {
    if (upTo !== null) return { reach: `up to ${say(upTo)}`, minor };
    const before = steps[index - 1]?.upTo;
    return { reach: before ? `above ${say(before)}` : 'any', minor };
  });
}

/** What happens past the last step of a table that ends; null when it doesn't. */
export function shippingEnd(shipping: ShippingField, words: Words): string | null {
  if (shipping.kind === 'flat') return null;
  const last = shipping.steps.at(-1)?.upTo;
  if (last === null || last === undefined) return null;
  const say = shipping.kind === 'byMass' ? words.pack : words.money;
  return `Nothing above ${say(last)} is delivered.`;
}

/** Shipping in one line for a list. */
export function shippingLine(
  shipping: ShippingField,
  freeFromMinor: number | null,
  words: Words,
): string {
  const base =
    shipping.kind === 'flat'
      ? shipping.minor === 0
        ? 'free'
        : words.money(shipping.minor)
      : `from ${words.money(Math.min(...shipping.steps.map(({ minor }) => minor)))} ${shipping.kind === 'byMass' ? 'by weight' : 'by value'}`;
  return freeFromMinor === null ? base : `${base}, free from ${words.money(freeFromMinor)}`;
}
