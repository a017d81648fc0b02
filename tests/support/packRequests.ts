import type {
  PackOffer,
  PackRequest,
  PackSupplier,
  Shipping,
  ShippingStep,
} from '#shared/index.ts';

/** Numbers from a seed, the same on every machine (mulberry32). */
export class Dice {
  #state: number;

  constructor(seed: number) {
    this.#state = seed >>> 0;
  }

  /** A number from 0 up to, not including, 1. */
  next(): number {
    this.#state = (this.#state + 0x6d2b79f5) >>> 0;
    let t = this.#state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  }

  /** A whole number from `least` to `most`, both included. */
  whole(least: number, most: number): number {
    return least + Math.floor(this.next() * (most - least + 1));
  }

  /** One of the choices. */
  pick<T>(choices: readonly [T, ...T[]]): T {
    return choices[this.whole(0, choices.length - 1)] ?? choices[0];
  }

  /** True this often. */
  chance(share: number): boolean {
    return this.next() < share;
  }
}

function steps(dice: Dice, unit: number, rising: boolean): ShippingStep[] {
  let upTo = 0;
  let minor = dice.whole(0, 6);
  const count = dice.whole(1, 3);
  return Array.from({ length: count }, (_, index) => {
    upTo += dice.whole(1, 6) * unit;
    minor = rising ? minor + dice.whole(0, 4) : dice.whole(0, 8);
    const open = index === count - 1 && dice.chance(0.7);
    return { upTo: open ? null : upTo, minor };
  });
}

function smallShipping(dice: Dice): Shipping {
  const kind = dice.pick(['flat', 'byMass', 'byValue'] as const);
  if (kind === 'flat') return { kind, minor: dice.whole(0, 8) };
  return { kind, steps: steps(dice, kind === 'byMass' ? 2 : 5, dice.chance(0.6)) };
}

/** A request small enough to try everything, full of odd terms and ties. */
export function smallRequest(dice: Dice): PackRequest {
  const lines = Array.from({ length: dice.whole(1, 2) }, (_, i) => ({
    id: `l${i}`,
    neededMg: dice.chance(0.15) ? 0 : dice.whole(1, 9),
  }));
  const suppliers = Array.from({ length: dice.whole(1, 3) }, (_, i): PackSupplier => ({
    id: `s${i}`,
    shipping: smallShipping(dice),
    ...(dice.chance(0.35) && { minimumOrderMinor: dice.whole(1, 25) }),
    ...(dice.chance(0.35) && { freeShippingFromMinor: dice.whole(1, 30) }),
  }));
  const offers = Array.from({ length: dice.whole(1, 5) }, (_, i): PackOffer => ({
    id: `${dice.pick(['b', 'a', 'Z'] as const)}${i}`,
    lineId: `l${dice.whole(0, lines.length - 1)}`,
    supplierId: `s${dice.whole(0, suppliers.length - 1)}`,
    packMg: dice.whole(1, 5),
    priceMinor: dice.whole(dice.chance(0.1) ? 0 : 1, 8),
    ...(dice.chance(0.3) && { maxPacks: dice.whole(0, 4) }),
    ...(dice.chance(0.2) && { multipleOf: dice.whole(2, 3) }),
  }));
  return { lines, offers, suppliers };
}

const packSizesKg = [0.25, 0.5, 1, 2, 2.5, 5, 10, 20, 25] as const;

function clubShipping(dice: Dice): Shipping {
  const kind = dice.pick(['flat', 'byMass', 'byMass', 'byValue'] as const);
  if (kind === 'flat') return { kind, minor: dice.whole(8, 20) * 50 };
  if (kind === 'byMass') {
    const most = [2, 5, 10, 20, 31.5] as const;
    let minor = dice.whole(40, 60) * 10;
    const table = most.map((kg): ShippingStep => {
      minor += dice.whole(10, 40) * 10;
      return { upTo: kg * 1e6, minor };
    });
    return { kind, steps: [...table, { upTo: null, minor: minor + dice.whole(8, 30) * 100 }] };
  }
  const first = dice.whole(8, 15) * 100;
  return {
    kind,
    steps: [
      { upTo: dice.whole(3, 6) * 1000, minor: first },
      { upTo: dice.whole(8, 15) * 1000, minor: first - dice.whole(1, 3) * 100 },
      { upTo: null, minor: dice.whole(2, 5) * 100 },
    ],
  };
}

function clubSupplier(dice: Dice, index: number): PackSupplier {
  return {
    id: `supplier-${index}`,
    shipping: clubShipping(dice),
    ...(dice.chance(0.4) && { minimumOrderMinor: dice.whole(2, 10) * 1000 }),
    ...(dice.chance(0.5) && { freeShippingFromMinor: dice.whole(10, 40) * 1000 }),
  };
}

/**
 * A request as a club would make it: common pack sizes, larger ones cheaper per gram, each supplier
 * with its own level of prices and its own terms.
 */
export function clubRequest(
  dice: Dice,
  size: { lines: number; offersPerLine: number; suppliers: number },
): PackRequest {
  const suppliers = Array.from({ length: size.suppliers }, (_, i) => clubSupplier(dice, i));
  const levels = suppliers.map(() => 0.85 + dice.next() * 0.3);
  const lines = Array.from({ length: size.lines }, (_, i) => ({
    id: `line-${String(i).padStart(2, '0')}`,
    neededMg: Math.ceil(dice.whole(3, 300) * 100_000 * 1.005),
  }));
  const offers = lines.flatMap(({ id: lineId }, at) => {
    const perKg = 300 + dice.next() * 1500;
    return Array.from({ length: size.offersPerLine }, (_, i): PackOffer => {
      const supplier = dice.whole(0, size.suppliers - 1);
      const kg = dice.pick(packSizesKg);
      const scale = (levels[supplier] ?? 1) * (0.9 + dice.next() * 0.2);
      return {
        id: `offer-${String(at).padStart(2, '0')}-${i}`,
        lineId,
        supplierId: `supplier-${supplier}`,
        packMg: kg * 1e6,
        priceMinor: Math.max(50, Math.round((perKg * scale * kg ** 0.85) / 5) * 5),
        ...(dice.chance(0.15) && { maxPacks: dice.whole(2, 12) }),
        ...(dice.chance(0.05) && { multipleOf: dice.whole(2, 4) }),
      };
    });
  });
  return { lines, offers, suppliers };
}
