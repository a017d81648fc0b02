import { exactSum } from '../money/minor.ts';
import { chargeWeights, type LineResult } from './chargeWeights.ts';
import { checkShareRequest, type CheckedRequest } from './checkShareRequest.ts';
import { divideGrams } from './divideGrams.ts';
import { divideMoney, taxPartsPerMillion } from './divideMoney.ts';
import { explainStep } from './explainStep.ts';
import type {
  ChargeBasis,
  ChargeShare,
  LineShare,
  ShareRequest,
  ShareSheet,
  ShareStep,
} from './shareTypes.ts';

type Account = { lines: LineShare[]; charges: ChargeShare[]; steps: ShareStep[] };
type Entry = CheckedRequest['lines'][number];

const chargeCodes: Record<ChargeBasis, string> = {
  mass: 'chargeByMass',
  value: 'chargeByValue',
  member: 'chargeByMember',
  portion: 'chargeByPortion',
};

const newAccount = (): Account => ({ lines: [], charges: [], steps: [] });

function divideLine(
  { line, pledges }: Entry,
  places: ReadonlyMap<string, number>,
  accounts: Account[],
  shelf: Account,
): LineResult {
  const { id: lineId, costMinor: ofMinor, taxRate = 0 } = line;
  const grams = divideGrams(line, pledges);
  const shelfWeight = line.shelfPays === false ? 0 : grams.shelfMg;
  const money = divideMoney(ofMinor, [...grams.mg, shelfWeight], taxRate);
  const share = (index: number, mg: number): LineShare => ({
    lineId,
    mg,
    costMinor: money.parts[index] ?? 0,
    taxMinor: money.taxParts[index] ?? 0,
  });
  const ratePpm = taxPartsPerMillion(taxRate);

  const parts = pledges.map(({ memberId }, index) => {
    const place = places.get(memberId) ?? 0;
    const mg = grams.mg[index] ?? 0;
    const own = share(index, mg);
    const { costMinor: minor, taxMinor } = own;
    const account = accounts[place];
    account?.lines.push(own);
    account?.steps.push(...(grams.steps[index] ?? []));
    if (mg > 0) {
      const values = { lineId, mg, ofMg: money.weightSum, ofMinor, minor };
      account?.steps.push({ code: 'lineCost', values });
    }
    if (taxMinor !== 0) {
      const values = { lineId, ratePpm, minor, taxMinor, ofTaxMinor: money.tax };
      account?.steps.push({ code: 'lineTax', values });
    }
    return { place, mg, costMinor: minor };
  });
  const shelfShare = share(pledges.length, grams.shelfMg);
  shelf.lines.push(shelfShare);
  return { line, parts, shelf: { mg: grams.shelfMg, costMinor: shelfShare.costMinor } };
}

function divideCharge(
  { charge, lineIds }: CheckedRequest['charges'][number],
  results: LineResult[],
  accounts: Account[],
  shelf: Account,
): void {
  const { id, basis, amountMinor: ofMinor, taxRate = 0 } = charge;
  const own = results.filter(({ line }) => lineIds.has(line.id));
  const weights = chargeWeights(basis, own, accounts.length);
  const money = divideMoney(ofMinor, weights, taxRate);
  const ratePpm = taxPartsPerMillion(taxRate);

  [...accounts, shelf].forEach((account, place) => {
    const minor = money.parts[place] ?? 0;
    const taxMinor = money.taxParts[place] ?? 0;
    const weight = weights[place] ?? 0;
    account.charges.push({ id, minor, taxMinor });
    if (weight > 0) {
      const of = money.weightSum;
      const measure: ShareStep['values'] =
        basis === 'mass' ? { mg: weight, ofMg: of } : { weight, ofWeight: of };
      const values = { chargeId: id, ...measure, ofMinor, minor };
      account.steps.push({ code: chargeCodes[basis], values });
    }
    if (taxMinor !== 0) {
      const values = { chargeId: id, ratePpm, minor, taxMinor, ofTaxMinor: money.tax };
      account.steps.push({ code: 'chargeTax', values });
    }
  });
}

function totalOf({ lines, charges }: Account): number {
  const sums = [...lines.map((line) => line.costMinor), ...charges.map((charge) => charge.minor)];
  return exactSum(sums, 'totalMinor');
}

/**
 * Divides what was bought, and what it cost, among those who pledged and the club's shelf. Members
 * come in the order of their earliest pledge, then id; lines and charges by id, so that the sheet
 * doesn't depend on the order of the input. Exact: no sum is ever a cent off.
 *
 * @throws RangeError naming the field, see `checkShareRequest`; past the safe integers too
 */
export function shareOut(request: ShareRequest): ShareSheet {
  const { lines, charges, members } = checkShareRequest(request);
  const places = new Map(members.map((memberId, place) => [memberId, place]));
  const accounts = members.map(newAccount);
  const shelf = newAccount();

  const results = lines.map((entry) => divideLine(entry, places, accounts, shelf));
  for (const entry of charges) divideCharge(entry, results, accounts, shelf);

  const shares = members.map((memberId, place) => {
    const account = accounts[place] ?? newAccount();
    const totalMinor = totalOf(account);
    const steps = [...account.steps, { code: 'total', values: { minor: totalMinor } }];
    const why = steps.map((step) => explainStep(step, request.currency));
    return { memberId, lines: account.lines, charges: account.charges, totalMinor, steps, why };
  });
  const shelfTotal = totalOf(shelf);
  const totals = [...shares.map((share) => share.totalMinor), shelfTotal];
  return {
    members: shares,
    shelf: { lines: shelf.lines, charges: shelf.charges, totalMinor: shelfTotal },
    totalMinor: exactSum(totals, 'totalMinor'),
  };
}
