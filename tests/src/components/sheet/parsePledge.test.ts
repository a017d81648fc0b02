import { describe, expect, it } from 'vitest';
import { formatMass } from '#shared/domain/mass/formatMass.ts';
import { beginsValue, moveSpot } from 'src/components/sheet/gridKeys.ts';
import { parsePledge, writePledge } from 'src/components/sheet/parsePledge.ts';
import { stepperMg } from 'src/components/sheet/useStepper.ts';

const parse = (text: string, stepMg = 1000) => parsePledge(text, stepMg, (mg) => formatMass(mg));

describe('a pledge as it is typed', () => {
  it.each([
    ['800', 800_000, undefined],
    ['1.2kg', 1_200_000, undefined],
    ['0,5 kg', 500_000, undefined],
    ['', 0, undefined],
    ['1000 up to 1500', 1_000_000, 1_500_000],
    ['1 kg up to 1.5 kg', 1_000_000, 1_500_000],
    ['500-800', 500_000, 800_000],
    ['500 – 800 g', 500_000, 800_000],
    ['500..800', 500_000, 800_000],
    ['500 up to 0', 500_000, null],
  ])('%s', (text, wantedMg, upToMg) => {
    expect(parse(text)).toEqual({ ok: true, wantedMg, upToMg });
  });

  it('offers both readings of a mark before three digits', () => {
    const read = parse('1,200');
    expect(read).toMatchObject({ ok: false, readings: [{ mg: 1200 }, { mg: 1_200_000 }] });
    const texts = read.ok ? [] : (read.readings ?? []).map(({ text }) => parse(text));
    expect(texts[1]).toEqual({ ok: true, wantedMg: 1_200_000, upToMg: undefined });
  });

  it.each(['abc', '-5', '1 up to 2 up to 3', '900 up to 800', '0.0005 g'])('refuses %s', (text) => {
    expect(parse(text).ok).toBe(false);
  });

  it('names the steps to either side', () => {
    expect(parse('120', 50_000)).toEqual({
      ok: false,
      reason: 'In steps of 50\u00a0g: 100\u00a0g or 150\u00a0g.',
    });
  });

  it('reads back what it writes', () => {
    expect(parse(writePledge(1_200_500, 1_500_000), 1)).toEqual({
      ok: true,
      wantedMg: 1_200_500,
      upToMg: 1_500_000,
    });
    expect(writePledge(0, null)).toBe('');
  });
});

describe('the keys of the grid', () => {
  const size = { rows: 4, columns: 5 };
  const go = (key: string, ctrlKey = false) =>
    moveSpot({ row: 1, column: 2 }, { key, ctrlKey, metaKey: false }, size);

  it('move within the grid and stop at its edges', () => {
    expect(go('ArrowUp')).toEqual({ row: 0, column: 2 });
    expect(go('ArrowDown')).toEqual({ row: 2, column: 2 });
    expect(go('ArrowLeft')).toEqual({ row: 1, column: 1 });
    expect(go('ArrowRight')).toEqual({ row: 1, column: 3 });
    expect(go('Home')).toEqual({ row: 1, column: 0 });
    expect(go('End', true)).toEqual({ row: 3, column: 4 });
    expect(go('PageUp')).toEqual({ row: 0, column: 2 });
    expect(go('PageDown')).toEqual({ row: 3, column: 2 });
    expect(go('a')).toBeNull();
  });

  it('begin a value with a digit or a mark, alone', () => {
    const key = (name: string, ctrlKey = false) =>
      beginsValue({ key: name, ctrlKey, metaKey: false, altKey: false });
    expect([key('5'), key('.'), key('a'), key('5', true)]).toEqual([true, true, false, false]);
  });
});

it('the stepper jumps 50 g, or whole steps where those are larger or do not divide it', () => {
  expect([1000, 50_000, 30_000, 200_000].map(stepperMg)).toEqual([50_000, 50_000, 60_000, 200_000]);
});
