import { exactSum } from '../money/minor.ts';
import { countedMg } from './netOfBag.ts';
import { reconcile, type Reconciliation } from './reconcile.ts';

/** A bag as its sums need it, all in milligrams. */
export interface BagMasses {
  readonly nominalMg: number;
  /** Null until it is weighed. */
  readonly netMg: number | null;
  readonly missing: boolean;
  /** What was weighed out of it and kept. */
  readonly portionsMg: number;
  readonly spilledMg: number;
  /** Weighed when it was closed; null before. */
  readonly shelfMg: number | null;
}

/** What a bag brings into the targets: the lesser of nominal and net; 0 when it is missing or not yet weighed. */
export function bagCountsMg(bag: BagMasses): number {
  return bag.missing || bag.netMg === null ? 0 : countedMg(bag.nominalMg, bag.netMg);
}

/** What should still be in a bag: 0 once it is closed or when more came out than went in. */
export function bagHoldsMg(bag: BagMasses): number {
  if (bag.missing || bag.netMg === null || bag.shelfMg !== null) return 0;
  return Math.max(0, bag.netMg - bag.portionsMg - bag.spilledMg);
}

/** What of a bag may still be shared out: as `bagHoldsMg`, but no more than its label promised. */
export function bagLeavesMg(bag: BagMasses): number {
  if (bag.shelfMg !== null) return 0;
  return Math.max(0, bagCountsMg(bag) - bag.portionsMg - bag.spilledMg);
}

/** What became of one bag; of an open one everything left in it is unaccounted for. */
export function reconcileBag(bag: BagMasses): Reconciliation {
  return reconcile({
    netMg: bag.missing ? 0 : (bag.netMg ?? 0),
    portionsMg: bag.portionsMg,
    shelfMg: bag.shelfMg ?? 0,
    spilledMg: bag.spilledMg,
  });
}

/** What became of all bags of a line. */
export function reconcileBags(bags: readonly BagMasses[]): Reconciliation {
  const each = bags.map(reconcileBag);
  const sum = (key: 'netMg' | 'portionsMg' | 'shelfMg' | 'spilledMg') =>
    exactSum(
      each.map((bag) => bag[key]),
      key,
    );
  return reconcile({
    netMg: sum('netMg'),
    portionsMg: sum('portionsMg'),
    shelfMg: sum('shelfMg'),
    spilledMg: sum('spilledMg'),
  });
}
