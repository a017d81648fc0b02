import { describe, expect, it } from 'vitest';
import { bandPosition, bandWindow, judgeBand } from 'src/components/common/bandScale.ts';
import { checkFiles } from 'src/components/common/checkFiles.ts';
import { planSacks, sackHeight, sackMark, sayPacks } from 'src/components/common/sackPlan.ts';
import { fromZonedInput, toZonedInput } from 'src/components/common/zonedInput.ts';

const pack = (sizeMg: number, count: number, filledPermille: number) => ({
  label: `${sizeMg / 1e6} kg`,
  sizeMg,
  count,
  filledPermille,
});

describe('planSacks', () => {
  it('fills equal sacks one after the other', () => {
    expect(planSacks([pack(5e6, 2, 910)]).map(({ filled }) => filled)).toEqual([1000, 820]);
    expect(planSacks([pack(1e6, 3, 200)]).map(({ filled }) => filled)).toEqual([600, 0, 0]);
  });

  it('draws four, and one for five or more', () => {
    expect(planSacks([pack(1e6, 4, 1000)])).toHaveLength(4);
    expect(planSacks([pack(1e6, 12, 950)])).toMatchObject([{ times: 12, filled: 950 }]);
  });

  it('draws none for none', () => {
    expect(planSacks([pack(1e6, 0, 0)])).toEqual([]);
    expect(sayPacks([])).toBe('no packs yet');
  });

  it('grows with the pack and stays visible', () => {
    const heights = [1e4, 2.5e5, 1e6, 5e6, 25e6, 1e9].map(sackHeight);
    expect(heights).toEqual([...heights].sort((a, b) => a - b));
    expect(heights[0]).toBe(26);
    expect(heights.at(-1)).toBe(76);
  });

  it.each([
    [25e6, '25'],
    [2.5e6, '2.5'],
    [2.5e5, '¼'],
    [5e5, '½'],
    [1e5, '0.1'],
  ])('marks %d mg as %s', (mg, mark) => {
    expect(sackMark(mg)).toBe(mark);
  });

  it('says what it shows', () => {
    expect(sayPacks([pack(5e6, 2, 910), pack(25e6, 1, 1000)])).toBe(
      '2 × 5 kg, 91 % spoken for; 1 × 25 kg, 100 % spoken for',
    );
  });
});

describe('the band', () => {
  const band = { targetMg: 1_200_000, bandMg: 6_000 };

  it('takes its edges in', () => {
    expect(judgeBand(1_194_000, band)).toBe('within');
    expect(judgeBand(1_206_000, band)).toBe('within');
    expect(judgeBand(1_193_999, band)).toBe('below');
    expect(judgeBand(1_206_001, band)).toBe('above');
  });

  it('puts the target amid the window and never leaves the track', () => {
    expect(bandPosition(1_200_000, band)).toBe((bandWindow.from + bandWindow.to) / 2);
    expect(bandPosition(0, band)).toBe(0);
    expect(bandPosition(9_000_000, band)).toBe(100);
    const places = [0, 600_000, 1_194_000, 1_200_000, 1_206_000, 1_210_000, 1_300_000].map((mg) =>
      bandPosition(mg, band),
    );
    expect(places).toEqual([...places].sort((a, b) => a - b));
  });
});

describe('zoned input', () => {
  it.each([
    ['2026-12-12T14:00:00.000Z', 'Europe/Dublin', '2026-12-12T14:00'],
    ['2026-07-01T22:30:00.000Z', 'Europe/Berlin', '2026-07-02T00:30'],
    ['2026-01-01T00:00:00.000Z', 'America/New_York', '2025-12-31T19:00'],
    ['2026-03-29T00:30:00.000Z', 'Asia/Kolkata', '2026-03-29T06:00'],
  ])('shows %s in %s as %s and reads it back', (iso, zone, text) => {
    expect(toZonedInput(iso, zone)).toBe(text);
    expect(fromZonedInput(text, zone)).toBe(iso);
  });

  it('moves an hour that the clocks skip forward', () => {
    expect(fromZonedInput('2026-03-29T01:30', 'Europe/Dublin')).toBe('2026-03-29T01:30:00.000Z');
  });

  it('reads nothing from what is not complete', () => {
    expect(fromZonedInput('', 'UTC')).toBeNull();
    expect(fromZonedInput('2026-12', 'UTC')).toBeNull();
    expect(toZonedInput(null, 'UTC')).toBe('');
    expect(toZonedInput('soon', 'UTC')).toBe('');
  });
});

describe('checkFiles', () => {
  const file = (name: string, type: string, size = 10) =>
    new File([new Uint8Array(size)], name, { type });
  const limits = { accept: 'image/*,application/pdf,.csv', maxBytes: 1_000_000, multiple: true };

  it('takes what fits by kind or ending', () => {
    const files = [file('a.png', 'image/png'), file('b.pdf', 'application/pdf'), file('c.CSV', '')];
    expect(checkFiles(files, limits)).toEqual({ files, problem: '' });
  });

  it('names the first that does not fit and takes the rest', () => {
    const good = file('a.png', 'image/png');
    const all = [
      file('x.exe', 'application/x-msdownload'),
      good,
      file('big.png', 'image/png', 1_000_001),
    ];
    expect(checkFiles(all, limits)).toEqual({
      files: [good],
      problem: 'x.exe is not a kind of file that is taken here.',
    });
    expect(checkFiles(all.slice(2), limits).problem).toBe('big.png is larger than 1 MB.');
  });

  it('takes one where one is asked', () => {
    const all = [file('a.csv', 'text/csv'), file('b.csv', 'text/csv')];
    expect(checkFiles(all, { ...limits, multiple: false }).files).toEqual(all.slice(0, 1));
  });
});
