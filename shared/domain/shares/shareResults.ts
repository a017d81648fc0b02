import type { DividedGrams } from './divideGrams.ts';
import { taxPartsPerMillion, type DividedMoney } from './divideMoney.ts';
import type { ChargeBasis, ShareCharge, ShareLine, ShareStep } from './shareTypes.ts';

/** A line divided: `index` counts its pledges in order, the shelf's money comes last. */
export type LineResult = { line: ShareLine; grams: DividedGrams; money: DividedMoney };

/** A charge divided: `place` counts the members in order, the shelf's money comes last. */
export type ChargeResult = { charge: ShareCharge; weights: number[]; money: DividedMoney };

const chargeCodes: Record<ChargeBasis, string> = {
  mass: 'chargeByMass',
  value: 'chargeByValue',
  member: 'chargeByMember',
  portion: 'chargeByPortion',
};

/** The arithmetic of one pledge's grams, cost and tax. */
export function lineSteps({ line, grams, money }: LineResult, index: number): ShareStep[] {
  const { id: lineId, costMinor: ofMinor, taxRate = 0 } = line;
  const mg = grams.mg[index] ?? 0;
  const minor = money.parts[index] ?? 0;
  const taxMinor = money.taxParts[index] ?? 0;
  const steps = grams.explain(index);
  if (mg > 0) {
    steps.push({ code: 'lineCost', values: { lineId, mg, ofMg: money.weightSum, ofMinor, minor } });
  }
  if (taxMinor !== 0) {
    const ratePpm = taxPartsPerMillion(taxRate);
    const values = { lineId, ratePpm, minor, taxMinor, ofTaxMinor: money.tax };
    steps.push({ code: 'lineTax', values });
  }
  return steps;
}

/** The arithmetic of one member's part of a charge; nothing where it has no weight. */
export function chargeSteps({ charge, weights, money }: ChargeResult, place: number): ShareStep[] {
  const { id: chargeId, basis, amountMinor: ofMinor, taxRate = 0 } = charge;
  const minor = money.parts[place] ?? 0;
  const taxMinor = money.taxParts[place] ?? 0;
  const weight = weights[place] ?? 0;
  const steps: ShareStep[] = [];
  if (weight > 0) {
    const of = money.weightSum;
    const measure: ShareStep['values'] =
      basis === 'mass' ? { mg: weight, ofMg: of } : { weight, ofWeight: of };
    steps.push({ code: chargeCodes[basis], values: { chargeId, ...measure, ofMinor, minor } });
  }
  if (taxMinor !== 0) {
    const ratePpm = taxPartsPerMillion(taxRate);
    const values = { chargeId, ratePpm, minor, taxMinor, ofTaxMinor: money.tax };
    steps.push({ code: 'chargeTax', values });
  }
  return steps;
}
