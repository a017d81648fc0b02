import type { Item, LineModel, SupplierModel } from './packModel.ts';

/** Weights that turn a supplier's price and mass into a reduced price: `alpha` price + `beta` mass. */
export type Weights = { alpha: ArrayLike<number>; beta: ArrayLike<number> };

/** A line's usable items, cheapest per mass first, with what bounds a search over them. */
export type CoverItems = {
  /** Places in the line's items. */
  order: number[];
  items: Item[];
  prices: Float64Array;
  /** Least reduced price per mass among the items from here on. */
  efficiency: Float64Array;
  /** Last place whose item may be bought beyond the need; -1 without one. */
  lastPad: number;
  /** How often beyond the need each item may be bought. */
  extra: Float64Array;
};

/** The reduced price of an item. */
export function reducedPrice(item: Item, { alpha, beta }: Weights): number {
  const price = item.price * (alpha[item.supplier] as number);
  return Math.max(0, price + item.mass * (beta[item.supplier] as number));
}

function extraCount({ price, mass }: Item, { terms, minimum, free }: SupplierModel): number {
  const { shipping } = terms;
  const last = shipping.kind === 'flat' ? 0 : (shipping.steps.at(-2)?.upTo ?? 0) + 1;
  const value = Math.max(
    minimum,
    free === Infinity ? 0 : free,
    shipping.kind === 'byValue' ? last : 0,
  );
  const byValue = price > 0 ? Math.ceil(value / price) : 0;
  return byValue + (shipping.kind === 'byMass' ? Math.ceil(last / mass) : 0);
}

/**
 * Prepares a search over one line's covers.
 *
 * @param allowed by supplier: whether it may be used
 * @param padded by supplier: whether buying beyond the need may pay
 */
export function coverItems(
  line: LineModel,
  suppliers: readonly SupplierModel[],
  allowed: readonly boolean[],
  padded: readonly boolean[],
  weights: Weights,
): CoverItems {
  const usable = line.items
    .map((item, place) => {
      const price = reducedPrice(item, weights);
      return { item, place, price, efficiency: price / item.mass };
    })
    .filter(({ item }) => allowed[item.supplier])
    .sort((a, b) => a.efficiency - b.efficiency || b.item.mass - a.item.mass);
  const items = usable.map(({ item }) => item);
  return {
    order: usable.map(({ place }) => place),
    items,
    prices: Float64Array.from(usable, ({ price }) => price),
    efficiency: Float64Array.from(usable, ({ efficiency }) => efficiency),
    lastPad: items.findLastIndex((item) => padded[item.supplier]),
    extra: Float64Array.from(items, (item) =>
      padded[item.supplier] ? extraCount(item, suppliers[item.supplier] as SupplierModel) : 0,
    ),
  };
}
