import { apportion } from '../shares/apportion.ts';
import { containedTax } from '../shares/divideMoney.ts';
import type { BillFacts } from './orderTypes.ts';

/** The tax that the rates of a bill's rows contain together; what the form offers until the bill's own figure is typed. */
export function taxByRates(bill: Pick<BillFacts, 'goods' | 'charges'>): number {
  return [...bill.goods, ...bill.charges].reduce(
    (sum, row) => sum + containedTax(row.amountMinor, row.taxRatePpm / 1_000_000),
    0,
  );
}

/**
 * The bill's tax over its rows, goods first: by what their rates contain, or by their amounts where no rate says.
 * The parts sum to the bill's tax, which wins over the rates.
 */
export function billTaxes(bill: Pick<BillFacts, 'goods' | 'charges' | 'taxMinor'>): number[] {
  const rows = [...bill.goods, ...bill.charges];
  const byRate = rows.map((row) =>
    Math.abs(containedTax(row.amountMinor, row.taxRatePpm / 1_000_000)),
  );
  const weights = byRate.some((tax) => tax > 0)
    ? byRate
    : rows.map((row) => Math.abs(row.amountMinor));
  if (weights.every((weight) => weight === 0)) return rows.map(() => 0);
  const signed = rows.map((row, index) => (row.amountMinor < 0 ? -1 : 1) * (weights[index] ?? 0));
  // With a rebate among the rows its tax counts against the others'.
  const net = signed.reduce((sum, weight) => sum + weight, 0);
  const gross = weights.reduce((sum, weight) => sum + weight, 0);
  if (net === gross || net <= 0) return apportion(bill.taxMinor, weights);
  const scaled = Math.round((bill.taxMinor * gross) / net);
  const parts = apportion(scaled, weights).map((part, index) =>
    (signed[index] ?? 0) < 0 ? 0 - part : part,
  );
  const off = bill.taxMinor - parts.reduce((sum, part) => sum + part, 0);
  const largest = weights.indexOf(Math.max(...weights));
  parts[largest] = (parts[largest] ?? 0) + off;
  return parts;
}

/** The rate at which an amount contains a tax, for `taxRate`. */
export function effectiveRate(amountMinor: number, taxMinor: number): number {
  const net = Math.abs(amountMinor) - Math.abs(taxMinor);
  return taxMinor === 0 || net <= 0 ? 0 : Math.abs(taxMinor) / net;
}
