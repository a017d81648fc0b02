import { minorToDecimal } from '../money/formatMoney.ts';
import type { ShareStep } from './shareTypes.ts';

function grams(mg: number): string {
  const digits = String(mg).padStart(4, '0');
  const whole = digits.slice(0, -3).replace(/\B(?=(\d{3})+$)/g, ' ');
  const fraction = digits.slice(-3).replace(/0+$/, '');
  return `${whole}${fraction && `.${fraction}`} g`;
}

function percent(ratePpm: number): string {
  return `${ratePpm / 10_000} %`;
}

/**
 * A step of the arithmetic in plain English.
 *
 * @example explainStep(step, 'EUR') // '600 g of 23 650 g, of 95.00: 2.41'
 */
export function explainStep({ code, values }: ShareStep, currency: string): string {
  const g = (key: string) => grams(Number(values[key]));
  const money = (key: string) => minorToDecimal(Number(values[key]), currency);
  const ofAmount = () => `of ${money('ofMinor')}: ${money('minor')}`;
  switch (code) {
    case 'wanted':
      return `${g('mg')} as asked for`;
    case 'upTo':
      return `room for ${g('takeMg')} of ${g('ofMg')}, of ${g('freeMg')} to spare: ${g('mg')} more`;
    case 'spread':
      return `${g('takeMg')} asked for of ${g('ofMg')}, of ${g('freeMg')} to spare: ${g('mg')} more`;
    case 'spreadCapped':
      return `up to ${g('takeMg')} more of ${g('ofMg')}, of ${g('freeMg')} to spare: ${g('mg')} more`;
    case 'scaled':
      return `too little: ${g('wantedMg')} asked for of ${g('wantedAllMg')}, of ${g('availableMg')}: ${g('mg')}`;
    case 'queued':
      return `too little: ${g('wantedMg')} asked for, ${g('leftMg')} left at your turn: ${g('mg')}`;
    case 'lineCost':
    case 'chargeByMass':
      return `${g('mg')} of ${g('ofMg')}, ${ofAmount()}`;
    case 'chargeByValue':
      return `goods for ${money('weight')} of ${money('ofWeight')}, ${ofAmount()}`;
    case 'chargeByMember':
      return `1 of ${values['ofWeight']} members, ${ofAmount()}`;
    case 'chargeByPortion':
      return `${values['weight']} of ${values['ofWeight']} portions, ${ofAmount()}`;
    case 'lineTax':
    case 'chargeTax':
      return `tax at ${percent(Number(values['ratePpm']))} contained in ${money('minor')}: ${money('taxMinor')}`;
    case 'handedOn':
      return `${g('mg')} handed on by agreement: ${money('minor')}`;
    default:
      return `in total: ${money('minor')}`;
  }
}
