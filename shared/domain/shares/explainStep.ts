import { minorToDecimal } from '../money/formatMoney.ts';
import type { ShareStep } from './shareTypes.ts';

type Values = ShareStep['values'];

function grams(values: Values, key: string): string {
  const mg = Number(values[key]);
  const rest = mg % 1000;
  const whole = String((mg - rest) / 1000);
  const grouped = whole.length > 3 ? whole.replace(/\B(?=(\d{3})+$)/g, ' ') : whole;
  if (rest === 0) return `${grouped} g`;
  return `${grouped}.${String(rest).padStart(3, '0').replace(/0+$/, '')} g`;
}

function ofAmount(values: Values, currency: string): string {
  return `of ${money(values, 'ofMinor', currency)}: ${money(values, 'minor', currency)}`;
}

function money(values: Values, key: string, currency: string): string {
  return minorToDecimal(Number(values[key]), currency);
}

/** What the sentence says before the amount it is a part of. */
function measure(code: string, values: Values, currency: string): string {
  switch (code) {
    case 'lineCost':
    case 'chargeByMass':
      return `${grams(values, 'mg')} of ${grams(values, 'ofMg')}`;
    case 'chargeByValue':
      return `goods for ${money(values, 'weight', currency)} of ${money(values, 'ofWeight', currency)}`;
    case 'chargeByMember':
      return `1 of ${values['ofWeight']} members`;
    default:
      return `${values['weight']} of ${values['ofWeight']} portions`;
  }
}

function extra(claim: string, values: Values): string {
  const [of, free] = [grams(values, 'ofMg'), grams(values, 'freeMg')];
  return `${claim} of ${of}, of ${free} to spare: ${grams(values, 'mg')} more`;
}

function tax(values: Values, currency: string): string {
  const rate = Number(values['ratePpm']) / 10_000;
  const [part, whole] = [money(values, 'taxMinor', currency), money(values, 'minor', currency)];
  return `tax at ${rate} % contained in ${whole}: ${part}`;
}

/**
 * A step of the arithmetic in plain English.
 *
 * @example explainStep(step, 'EUR') // '600 g of 23 650 g, of 95.00: 2.41'
 */
export function explainStep({ code, values }: ShareStep, currency: string): string {
  switch (code) {
    case 'wanted':
      return `${grams(values, 'mg')} as asked for`;
    case 'upTo':
      return extra(`room for ${grams(values, 'takeMg')}`, values);
    case 'spread':
      return extra(`${grams(values, 'takeMg')} asked for`, values);
    case 'spreadCapped':
      return extra(`up to ${grams(values, 'takeMg')} more`, values);
    case 'scaled':
      return `too little: ${grams(values, 'wantedMg')} asked for of ${grams(values, 'wantedAllMg')}, of ${grams(values, 'availableMg')}: ${grams(values, 'mg')}`;
    case 'queued':
      return `too little: ${grams(values, 'wantedMg')} asked for, ${grams(values, 'leftMg')} left at your turn: ${grams(values, 'mg')}`;
    case 'lineTax':
    case 'chargeTax':
      return tax(values, currency);
    case 'handedOn':
      return `${grams(values, 'mg')} handed on by agreement: ${money(values, 'minor', currency)}`;
    case 'total':
      return `in total: ${money(values, 'minor', currency)}`;
    default:
      return `${measure(code, values, currency)}, ${ofAmount(values, currency)}`;
  }
}
