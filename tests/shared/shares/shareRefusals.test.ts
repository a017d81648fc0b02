import { describe, expect, test } from 'vitest';
import { shareOut, type ShareRequest } from '#shared/index.ts';
import { shareCharge, shareLine, sharePledge, shareRequest } from '#tests/support/shareRequests.ts';

const line = shareLine();
const amy = sharePledge('amy', 1);
const most = Number.MAX_SAFE_INTEGER;
const withLine = (over: object) => shareRequest([shareLine(over)], [amy]);
const withPledge = (over: object) => shareRequest([line], [{ ...amy, ...over }]);
const withCharge = (over: object) => shareRequest([line], [amy], [shareCharge(over)]);

describe('shareOut refuses', () => {
  test.each<[string, ShareRequest, RegExp]>([
    ['negative grams', withLine({ availableMg: -1 }), /availableMg/],
    ['half milligrams', withLine({ availableMg: 0.5 }), /availableMg/],
    ['a cost below zero', withLine({ costMinor: -1 }), /costMinor/],
    ['a cost that is no number', withLine({ costMinor: NaN }), /costMinor/],
    ['a step of zero', withLine({ stepMg: 0 }), /stepMg/],
    ['a reserve below zero', withLine({ reserveMg: -1 }), /reserveMg/],
    ['a spread below zero', withLine({ spreadMaxPermille: -1 }), /spreadMaxPermille/],
    ['a tax below zero', withLine({ taxRate: -0.1 }), /taxRate/],
    ['a tax without end', withLine({ taxRate: Infinity }), /taxRate/],
    ['an unknown policy', withLine({ surplus: 'burn' }), /surplus/],
    ['a pledge off the step', withPledge({ wantedMg: 1500 }), /wantedMg/],
    ['a pledge below zero', withPledge({ wantedMg: -1000 }), /wantedMg/],
    ['an upTo off the step', withPledge({ upToMg: 1500 }), /upToMg/],
    ['a pledge on no line', withPledge({ lineId: 'x' }), /lineId/],
    ['a time that is none', withPledge({ at: 'yesterday' }), /at/],
    ['a time without its zone', withPledge({ at: '2026-03-01T19:00:00' }), /at/],
    ['two pledges of one', shareRequest([line], [amy, sharePledge('amy', 2, 9)]), /amy/],
    ['two lines of one id', shareRequest([line, line], [amy]), /kno3/],
    ['two charges of one id', shareRequest([line], [], [shareCharge(), shareCharge()]), /freight/],
    ['half a cent', withCharge({ amountMinor: 0.5 }), /amountMinor/],
    ['an unknown basis', withCharge({ basis: 'luck' }), /basis/],
    ['a charge on no line', withCharge({ lineIds: ['x'] }), /lineIds/],
    ['a charge with a bad rate', withCharge({ taxRate: NaN }), /taxRate/],
    ['an unknown currency', { ...withLine({}), currency: 'XYZ' }, /XYZ/],
    [
      'a total past the safe integers',
      shareRequest([shareLine({ costMinor: most })], [amy], [shareCharge({ amountMinor: 1 })]),
      /totalMinor/,
    ],
  ])('%s', (_, request, field) => {
    expect(() => shareOut(request)).toThrow(RangeError);
    expect(() => shareOut(request)).toThrow(field);
  });

  test('nothing that is merely large', () => {
    const greedy = [amy, sharePledge('bo', 1, 1)].map((pledge) => ({
      ...pledge,
      upToMg: most - 991,
    }));
    expect(() => shareOut(shareRequest([line], greedy))).not.toThrow();
  });
});
