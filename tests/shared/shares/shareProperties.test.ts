import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shareOut, type ShareSheet } from '#shared/index.ts';
import { anyShareRequest } from '#tests/support/shareRequests.ts';

const runs = { numRuns: 400 };
const total = (values: number[]) => values.reduce((a, b) => a + b, 0);

function mgOf(sheet: ShareSheet, memberId: string, lineId: string): number {
  const member = sheet.members.find((other) => other.memberId === memberId);
  return member?.lines.find((line) => line.lineId === lineId)?.mg ?? 0;
}

describe('shareOut, always', () => {
  it('shares out every milligram, every cent and every cent of tax', () => {
    fc.assert(
      fc.property(anyShareRequest, (request) => {
        const sheet = shareOut(request);
        const all = [...sheet.members, sheet.shelf];
        for (const line of request.lines) {
          const parts = all.flatMap((who) => who.lines.filter((part) => part.lineId === line.id));
          expect(total(parts.map((part) => part.mg))).toBe(line.availableMg);
          expect(total(parts.map((part) => part.costMinor))).toBe(line.costMinor);
          expect(parts.every((part) => part.mg >= 0 && part.costMinor >= 0)).toBe(true);
        }
        for (const charge of request.charges) {
          const parts = all.flatMap((who) => who.charges.filter((part) => part.id === charge.id));
          expect(total(parts.map((part) => part.minor))).toBe(charge.amountMinor);
          const rate = Math.round((charge.taxRate ?? 0) * 1e6);
          const exact = (Math.abs(charge.amountMinor) * rate) / (1e6 + rate);
          const tax = total(parts.map((part) => part.taxMinor));
          expect(Math.abs(tax)).toBe(Math.floor(exact + 0.5));
        }
        for (const who of all) {
          const own = [...who.lines.map((l) => l.costMinor), ...who.charges.map((c) => c.minor)];
          expect(who.totalMinor).toBe(total(own));
        }
        expect(total(all.map((who) => who.totalMinor))).toBe(sheet.totalMinor);
      }),
      runs,
    );
  });

  it("doesn't depend on the order of the input", () => {
    const shuffled = anyShareRequest.chain((request) =>
      fc.record({
        request: fc.constant(request),
        lines: fc.shuffledSubarray(request.lines, { minLength: request.lines.length }),
        pledges: fc.shuffledSubarray(request.pledges, { minLength: request.pledges.length }),
        charges: fc.shuffledSubarray(request.charges, { minLength: request.charges.length }),
      }),
    );
    fc.assert(
      fc.property(shuffled, ({ request, ...parts }) => {
        expect(shareOut({ ...request, ...parts })).toEqual(shareOut(request));
      }),
      runs,
    );
  });

  it('keeps portions in whole steps, what is wanted when there is enough, and upTo as the most', () => {
    fc.assert(
      fc.property(anyShareRequest, (request) => {
        const sheet = shareOut(request);
        for (const line of request.lines) {
          const own = request.pledges.filter((pledge) => pledge.lineId === line.id);
          const wanted = total(own.map((pledge) => pledge.wantedMg));
          for (const pledge of own) {
            const mg = mgOf(sheet, pledge.memberId, line.id);
            expect(mg % line.stepMg).toBe(0);
            if (wanted > line.availableMg) expect(mg).toBeLessThanOrEqual(pledge.wantedMg);
            else expect(mg).toBeGreaterThanOrEqual(pledge.wantedMg);
            const most = Math.max(pledge.wantedMg, pledge.upToMg ?? 0);
            if (line.surplus === 'shelf') expect(mg).toBeLessThanOrEqual(most);
            const spread = (pledge.wantedMg * (line.spreadMaxPermille ?? 1e9)) / 1000;
            expect(mg).toBeLessThanOrEqual(most + spread);
          }
        }
      }),
      runs,
    );
  });

  it('scales each portion to within a step of its quota', () => {
    fc.assert(
      fc.property(anyShareRequest, (request) => {
        const sheet = shareOut(request);
        for (const line of request.lines) {
          const own = request.pledges.filter((pledge) => pledge.lineId === line.id);
          const wanted = total(own.map((pledge) => pledge.wantedMg));
          if (wanted <= line.availableMg || line.shortage === 'queue') continue;
          const whole = line.availableMg - (line.availableMg % line.stepMg);
          for (const { memberId, wantedMg } of own) {
            const quota = (whole * wantedMg) / wanted;
            expect(Math.abs(mgOf(sheet, memberId, line.id) - quota)).toBeLessThan(line.stepMg);
          }
        }
      }),
      runs,
    );
  });

  it('gives nobody less for pledging more, beyond one step', () => {
    const raised = anyShareRequest
      .filter((request) => request.pledges.length > 0)
      .chain((request) =>
        fc.record({
          request: fc.constant(request),
          who: fc.nat(request.pledges.length - 1),
          steps: fc.integer({ min: 1, max: 5000 }),
        }),
      );
    fc.assert(
      fc.property(raised, ({ request, who, steps }) => {
        const pledge = request.pledges[who];
        const line = request.lines.find((other) => other.id === pledge?.lineId);
        if (!pledge || !line) throw new Error('a pledge without its line');
        const more = { ...pledge, wantedMg: pledge.wantedMg + steps * line.stepMg };
        const pledges = request.pledges.map((other) => (other === pledge ? more : other));
        const before = mgOf(shareOut(request), pledge.memberId, line.id);
        const after = mgOf(shareOut({ ...request, pledges }), pledge.memberId, line.id);
        expect(after).toBeGreaterThanOrEqual(before - line.stepMg);
      }),
      runs,
    );
  });
});
