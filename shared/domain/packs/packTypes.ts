/** One step of a shipping table: up to this much, inclusive, it costs `minor`; null is without end. */
export type ShippingStep = { upTo: number | null; minor: number };

/** How a supplier charges for shipping; steps are in mg (`byMass`) or minor units (`byValue`). */
export type Shipping =
  { kind: 'flat'; minor: number } | { kind: 'byMass' | 'byValue'; steps: ShippingStep[] };

/** A line to be covered: what was pledged and the reserve. */
export type PackLine = { id: string; neededMg: number };

/** A pack size at a price; bought in multiples of `multipleOf`, at most `maxPacks`. */
export type PackOffer = {
  id: string;
  lineId: string;
  supplierId: string;
  packMg: number;
  priceMinor: number;
  maxPacks?: number;
  multipleOf?: number;
};

/** A supplier's terms, in force only when something is bought from it. */
export type PackSupplier = {
  id: string;
  minimumOrderMinor?: number;
  freeShippingFromMinor?: number;
  shipping: Shipping;
};

/** What must be covered, and from what. */
export type PackRequest = { lines: PackLine[]; offers: PackOffer[]; suppliers: PackSupplier[] };

/** The least extra mass on one line at which its packs get cheaper; minor units per gram. */
export type NextStep = {
  lineId: string;
  moreMg: number;
  perGramBefore: number;
  perGramAfter: number;
};

/** Which packs to order: `packs` names the offers that are bought, `leftOverMg` every line. */
export type PackPlan = {
  feasible: boolean;
  exact: boolean;
  reason?: string;
  packs: Record<string, number>;
  goodsMinor: number;
  shippingMinor: number;
  shippingBySupplier: Record<string, number>;
  totalMinor: number;
  leftOverMg: Record<string, number>;
  nextStep?: NextStep;
};
