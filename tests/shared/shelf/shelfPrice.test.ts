import { expect, it } from 'vitest';
import { shelfPriceMinor } from '#shared/domain/shelf/shelfPrice.ts';

it('rounds a price half up', () => {
  expect(shelfPriceMinor(1, 500_000)).toBe(1);
  expect(shelfPriceMinor(1, 499_999)).toBe(0);
  expect(shelfPriceMinor(300_000, 450)).toBe(135);
  expect(shelfPriceMinor(0, 450)).toBe(0);
});
