import { describe, expect, it } from 'vitest';
import { planPacks, type PackOffer, type PackPlan, type PackRequest } from '#shared/index.ts';
import { bruteForcePlan } from '#tests/support/bruteForcePlan.ts';
import { Dice, smallRequest } from '#tests/support/packRequests.ts';

const kg = 1_000_000;
const suppliers = [{ id: 'mill', shipping: { kind: 'flat', minor: 500 } as const }];

function offer(id: string, lineId: string, kilos: number, priceMinor: number): PackOffer {
  return { id, lineId, supplierId: 'mill', packMg: kilos * kg, priceMinor };
}

describe('the next step', () => {
  const offers = [offer('one', 'kno3', 1, 600), offer('five', 'kno3', 5, 2300)];

  it('names the least that is missing for a lower price', () => {
    // Three singles for 18.00; the fourth kilo brings the sack of five for 23.00.
    const plan = planPacks({ lines: [{ id: 'kno3', neededMg: 3 * kg }], offers, suppliers });
    expect(plan.packs).toEqual({ one: 3 });
    expect(plan.nextStep).toEqual({
      lineId: 'kno3',
      moreMg: 1,
      perGramBefore: 0.6,
      perGramAfter: 0.46,
    });
  });

  it('starts where what was bought ends', () => {
    const lines = [{ id: 'kno3', neededMg: 3 * kg - 250_000 }];
    expect(planPacks({ lines, offers, suppliers }).nextStep?.moreMg).toBe(250_001);
  });

  it('is absent at the lowest price, and where the need would more than double', () => {
    const at = (neededMg: number) =>
      planPacks({ lines: [{ id: 'kno3', neededMg }], offers, suppliers }).nextStep;
    expect(at(5 * kg)).toBeUndefined();
    expect(at(1.4 * kg)).toBeUndefined();
    expect(at(1.6 * kg)).toMatchObject({ moreMg: 1_400_001 });
  });

  it('goes to the earlier of two lines, and skips one that needs nothing', () => {
    const twin = [offer('m1', 'mgso4', 1, 600), offer('m5', 'mgso4', 5, 2300)];
    const lines = [
      { id: 'fe', neededMg: 0 },
      { id: 'mgso4', neededMg: 3 * kg },
      { id: 'kno3', neededMg: 3 * kg },
    ];
    const iron = [offer('f1', 'fe', 1, 600), offer('f5', 'fe', 5, 100)];
    const step = planPacks({ lines, offers: [...offers, ...twin, ...iron], suppliers }).nextStep;
    expect(step?.lineId).toBe('mgso4');
  });

  /** Pack cost and grams of a line, by hand. */
  function lineOf(request: PackRequest, packs: Record<string, number>, lineId: string) {
    let [cost, mg] = [0, 0];
    for (const own of request.offers.filter((other) => other.lineId === lineId)) {
      cost += (packs[own.id] ?? 0) * own.priceMinor;
      mg += (packs[own.id] ?? 0) * own.packMg;
    }
    return { cost, mg };
  }

  function tryEveryMilligram(request: PackRequest, plan: PackPlan): PackPlan['nextStep'] {
    let best: PackPlan['nextStep'];
    for (const { id, neededMg } of request.lines) {
      const before = lineOf(request, plan.packs, id);
      for (let more = 1; more <= neededMg && more < (best?.moreMg ?? Infinity); more++) {
        const lines = request.lines.map((line) =>
          line.id === id ? { ...line, neededMg: neededMg + more } : line,
        );
        const raised = bruteForcePlan({ ...request, lines }, 30);
        if (!raised) break;
        const after = lineOf(request, raised.packs, id);
        if (after.cost * before.mg >= before.cost * after.mg) continue;
        best = {
          lineId: id,
          moreMg: more,
          perGramBefore: (before.cost * 1000) / before.mg,
          perGramAfter: (after.cost * 1000) / after.mg,
        };
      }
    }
    return best;
  }

  it('is what trying every milligram finds', () => {
    let found = 0;
    for (let seed = 1; found < 25; seed++) {
      const request = smallRequest(new Dice(seed));
      const plan = planPacks(request);
      if (!plan.feasible || request.offers.length > 3) continue;
      const expected = tryEveryMilligram(request, plan);
      expect(plan.nextStep, `seed ${seed}`).toEqual(expected);
      if (expected) found++;
    }
  });
});
