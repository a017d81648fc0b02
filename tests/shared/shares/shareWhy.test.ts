import { describe, expect, it } from 'vitest';
import { explainStep, shareOut } from '#shared/index.ts';
import { shareCharge, shareLine, sharePledge, shareRequest } from '#tests/support/shareRequests.ts';

describe('why', () => {
  it('opens every figure to its arithmetic', () => {
    const request = shareRequest(
      [shareLine({ taxRate: 0.19 })],
      [sharePledge('amy', 600), sharePledge('bo', 23_050, 1)],
      [
        shareCharge(),
        shareCharge({ id: 'bags', amountMinor: 101, basis: 'member' }),
        shareCharge({ id: 'duty', amountMinor: 500, basis: 'value', taxRate: 0.07 }),
        shareCharge({ id: 'rebate', amountMinor: -300, basis: 'portion' }),
      ],
    );
    expect(shareOut(request).members[0]?.why).toEqual([
      '600 g as asked for',
      '600 g of 23 650 g, of 95.00: 2.41',
      'tax at 19 % contained in 2.41: 0.38',
      '1 of 2 members, of 1.01: 0.51',
      'goods for 2.41 of 95.00, of 5.00: 0.13',
      'tax at 7 % contained in 0.13: 0.01',
      '600 g of 23 650 g, of 12.00: 0.30',
      '1 of 2 portions, of -3.00: -1.50',
      'in total: 1.85',
    ]);
  });

  it('says how grams were divided', () => {
    const amy = sharePledge('amy', 100, 0, { upToMg: 150_000 });
    const bo = sharePledge('bo', 100.5, 1);
    const why = (line: object) =>
      shareOut(shareRequest([shareLine({ stepMg: 500, costMinor: 0, ...line })], [amy, bo]))
        .members.map((member) => member.why)
        .map((lines) => lines.filter((text) => !/^in total|, of 0.00/.test(text)));
    expect(why({ availableMg: 270_500, surplus: 'spread', spreadMaxPermille: 100 })).toEqual([
      [
        '100 g as asked for',
        'room for 50 g of 50 g, of 70 g to spare: 50 g more',
        'up to 10 g more of 20 g, of 20 g to spare: 10 g more',
      ],
      ['100.5 g as asked for', 'up to 10 g more of 20 g, of 20 g to spare: 10 g more'],
    ]);
    expect(why({ availableMg: 100_000 })).toEqual([
      ['too little: 100 g asked for of 200.5 g, of 100 g: 50 g'],
      ['too little: 100.5 g asked for of 200.5 g, of 100 g: 50 g'],
    ]);
    expect(why({ availableMg: 100_000, shortage: 'queue' })).toEqual([
      ['too little: 100 g asked for, 100 g left at your turn: 100 g'],
      ['too little: 100.5 g asked for, 0 g left at your turn: 0 g'],
    ]);
  });

  it('has one sentence a step, each made from the step alone', () => {
    const request = shareRequest([shareLine()], [sharePledge('amy', 600)], [shareCharge()]);
    for (const { steps, why } of shareOut(request).members) {
      expect(steps.map((step) => explainStep(step, 'EUR'))).toEqual(why);
    }
  });

  it("follows the currency's decimals", () => {
    const request = shareRequest([shareLine()], [sharePledge('amy', 600)]);
    const last = (currency: string) => shareOut({ ...request, currency }).members[0]?.why.at(-1);
    expect(last('JPY')).toBe('in total: 9500');
    expect(last('KWD')).toBe('in total: 9.500');
  });
});
