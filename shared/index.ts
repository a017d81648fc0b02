export { apportion } from './domain/shares/apportion.ts';
export { shareOut } from './domain/shares/shareOut.ts';
export { explainStep } from './domain/shares/explainStep.ts';
export { compareIds, compareTurns, sortPledges } from './domain/shares/pledgeOrder.ts';
export type {
  ChargeBasis,
  ChargeShare,
  LineShare,
  MemberShare,
  ShareCharge,
  ShareLine,
  SharePledge,
  ShareRequest,
  ShareSheet,
  ShareStep,
  ShelfShare,
} from './domain/shares/shareTypes.ts';

export {
  cashStepMinor,
  currencyCodes,
  currencyExponent,
  isCurrency,
  roundToCash,
} from './domain/money/currencies.ts';
export { formatMoney, minorToDecimal } from './domain/money/formatMoney.ts';
export { parseMoney, type MoneyProblem, type ParsedMoney } from './domain/money/parseMoney.ts';
export type { Minor } from './domain/money/minor.ts';

export {
  ceilToStep,
  floorToStep,
  mgPerGram,
  reserveMg,
  type Milligrams,
} from './domain/mass/milligrams.ts';
export {
  parseMass,
  type MassProblem,
  type MassUnit,
  type ParsedMass,
} from './domain/mass/parseMass.ts';
export { formatMass, type MassDisplay } from './domain/mass/formatMass.ts';

export { planPacks } from './domain/packs/planPacks.ts';
export {
  perGram,
  pricePacks,
  type PackPrice,
  type PackProblem,
} from './domain/packs/pricePacks.ts';
export { explainObstacle, packObstacle, type PackObstacle } from './domain/packs/packObstacle.ts';
export { shippingCost } from './domain/packs/shippingCost.ts';
export type {
  NextStep,
  PackLine,
  PackOffer,
  PackPlan,
  PackRequest,
  PackSupplier,
  Shipping,
  ShippingStep,
} from './domain/packs/packTypes.ts';
