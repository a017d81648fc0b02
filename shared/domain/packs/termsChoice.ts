import type { PackModel } from './packModel.ts';
import type { ShippingOption } from './shippingOptions.ts';

/** A limit that lines share: the sum of their `sign` x value (or mass) may not pass `limit`. */
export type SharedLimit = {
  supplier: number;
  of: 'value' | 'mass';
  sign: 1 | -1;
  limit: number;
};

/** One way in which all shared suppliers' terms turn out together. */
export type TermsChoice = {
  /** Names the choice among all of a model. */
  key: string;
  /** By supplier: whether anything may be bought from it. */
  allowed: boolean[];
  /** By supplier: whether buying beyond the need may pay under this choice. */
  padded: boolean[];
  shipping: number;
  limits: SharedLimit[];
};

function limitsOf(supplier: number, option: ShippingOption): SharedLimit[] {
  const limits: SharedLimit[] = [];
  const add = (of: SharedLimit['of'], sign: 1 | -1, limit: number) =>
    limits.push({ supplier, of, sign, limit });
  if (option.leastValue > 0) add('value', -1, -option.leastValue);
  if (option.leastMass > 0) add('mass', -1, -option.leastMass);
  if (option.mostValue < Infinity) add('value', 1, option.mostValue);
  if (option.mostMass < Infinity) add('mass', 1, option.mostMass);
  return limits;
}

/** The choice made of one option for each shared supplier; private ones are always allowed. */
export function termsChoice(
  model: PackModel,
  options: ReadonlyMap<number, ShippingOption>,
): TermsChoice {
  let key = '';
  let shipping = 0;
  const limits: SharedLimit[] = [];
  const padded = model.suppliers.map((supplier) => !supplier.shared && supplier.padded);
  const allowed = model.suppliers.map(() => true);
  for (const [supplier, option] of options) {
    key += `${option.key} `;
    allowed[supplier] = option.used;
    shipping += option.shipping;
    const own = limitsOf(supplier, option);
    padded[supplier] = own.some((limit) => limit.sign === -1);
    limits.push(...own);
  }
  return { key, allowed, padded, shipping, limits };
}
