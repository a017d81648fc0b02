import type { SupplierModel } from './packModel.ts';

/**
 * One way a supplier's terms can turn out. Bounds that don't matter are open: a plan outside its
 * option's bounds is then at least as cheap in truth as the option says.
 */
export type ShippingOption = {
  /** Names the option among the supplier's. */
  key: string;
  used: boolean;
  shipping: number;
  leastValue: number;
  mostValue: number;
  leastMass: number;
  mostMass: number;
};

const open = { key: 'flat', leastValue: 0, mostValue: Infinity, leastMass: 0, mostMass: Infinity };
const unused: ShippingOption = { ...open, key: 'unused', used: false, shipping: 0 };

function stepOptions({ terms, minimum, free }: SupplierModel): ShippingOption[] {
  const { shipping } = terms;
  if (shipping.kind === 'flat') {
    const reachable = minimum < free;
    return reachable
      ? [{ ...open, used: true, shipping: shipping.minor, leastValue: minimum }]
      : [];
  }
  const byValue = shipping.kind === 'byValue';
  const { steps } = shipping;
  return steps.flatMap(({ upTo, minor }, index): ShippingOption[] => {
    const most = upTo ?? Infinity;
    const above = index === 0 ? -1 : (steps[index - 1]?.upTo ?? 0);
    const least = steps.slice(0, index).some((step) => step.minor > minor) ? above + 1 : 0;
    const terms = { used: true, shipping: minor, leastValue: minimum };
    const option = { ...open, ...terms, key: `step ${index}` };
    if (!byValue) return minimum < free ? [{ ...option, leastMass: least, mostMass: most }] : [];
    const empty = most < minimum || above + 1 >= free;
    const leastValue = Math.max(minimum, least);
    return empty ? [] : [{ ...option, leastValue, mostValue: most }];
  });
}

/** Whether one option's plans are all another's too, at no higher price. */
function covers(a: ShippingOption, b: ShippingOption): boolean {
  return (
    (a.used || !b.used) &&
    a.shipping <= b.shipping &&
    a.leastValue <= b.leastValue &&
    a.mostValue >= b.mostValue &&
    a.leastMass <= b.leastMass &&
    a.mostMass >= b.mostMass
  );
}

/**
 * The ways a supplier's terms can turn out: not used, free, or one of its shipping steps. Every plan
 * is within the bounds of the option that prices it truly.
 */
export function shippingOptions(supplier: SupplierModel): ShippingOption[] {
  const options = stepOptions(supplier);
  if (supplier.free < Infinity) {
    const leastValue = Math.max(supplier.free, supplier.minimum);
    options.push({ ...open, key: 'free', used: true, shipping: 0, leastValue });
  }
  options.push(unused);
  return options.filter(
    (option, index) =>
      !options.some(
        (other, at) =>
          at !== index && covers(other, option) && (at < index || !covers(option, other)),
      ),
  );
}
