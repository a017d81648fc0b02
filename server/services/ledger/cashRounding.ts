import { cashStepMinor, roundToCash } from '#shared/domain/money/currencies.ts';
import { minorToDecimal } from '#shared/domain/money/formatMoney.ts';
import { invalid } from '../problem.ts';

/**
 * What cash settles on the member's account: a sum that coins can pay stands for the exact sum it rounds.
 * @param exactMinor what is asked for, or what is to be given back
 * @returns the minor units to post on the member's account, and what goes to rounding (positive: coins were short)
 * @throws DomainProblem 422 at `amountMinor` for a sum that coins can't pay
 */
export function settleCash(
  amountMinor: number,
  exactMinor: number,
  currency: string,
): { memberMinor: number; roundingMinor: number } {
  const step = cashStepMinor(currency);
  if (amountMinor % step !== 0) {
    const smallest = `${minorToDecimal(step, currency)} ${currency}`;
    throw invalid({ amountMinor: `Cash goes in steps of ${smallest}.` });
  }
  const rounds = exactMinor > 0 && roundToCash(exactMinor, currency) === amountMinor;
  const memberMinor = rounds ? exactMinor : amountMinor;
  return { memberMinor, roundingMinor: memberMinor - amountMinor };
}
