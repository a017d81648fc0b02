import { roughSum, safeNumber } from '../money/minor.ts';
import { apportion } from './apportion.ts';

/** Parts of an amount with the tax in them, in the weights' order, and what they were measured by. */
export type DividedMoney = { parts: number[]; taxParts: number[]; weightSum: number; tax: number };

/** A tax rate as whole millionths: 0.19 is 190 000. */
export function taxPartsPerMillion(rate: number): number {
  return Math.round(rate * 1_000_000);
}

/**
 * The tax contained in an amount, rounded half up on the absolute value.
 *
 * @example containedTax(11900, 0.19) // 1900
 */
export function containedTax(amountMinor: number, rate: number): number {
  const r = BigInt(taxPartsPerMillion(rate));
  const base = 1_000_000n + r;
  const product = BigInt(Math.abs(amountMinor)) * r;
  const tax = safeNumber((product * 2n + base) / (base * 2n), 'tax');
  return amountMinor < 0 ? 0 - tax : tax;
}

/**
 * Divides an amount and the tax it contains. The shelf's weight comes last; it bears everything
 * when all weights are zero. The tax follows the parts' absolute amounts.
 */
export function divideMoney(amountMinor: number, weights: number[], rate = 0): DividedMoney {
  const weightSum = roughSum(weights);
  const shelfAlone = weights.map((_, index) => (index === weights.length - 1 ? 1 : 0));
  const parts = apportion(amountMinor, weightSum === 0 ? shelfAlone : weights);
  const tax = containedTax(amountMinor, rate);
  const taxParts = apportion(
    tax,
    parts.map((part) => Math.abs(part)),
  );
  return { parts, taxParts, weightSum, tax };
}
