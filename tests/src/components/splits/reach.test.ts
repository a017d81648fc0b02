import { describe, expect, it } from 'vitest';
import { reachOf } from 'src/components/splits/reach.ts';
import { bagWith, portionWith } from '#tests/support/splitSheets.ts';

describe('reachOf', () => {
  it('compares what the line’s open bags hold with what still waits', () => {
    const first = bagWith({ portionsMg: 24_000_000, spilledMg: 100_000 });
    const second = bagWith({ id: 'bag-2', number: 2, nominalMg: 1_000_000, netMg: 1_000_000 });
    const others = [
      bagWith({ id: 'bag-3', shelfMg: 500_000, closedAt: '2027-01-01T00:00:00Z' }),
      bagWith({ id: 'bag-4', lineId: 'b' }),
    ];
    const portions = [
      portionWith(),
      portionWith({ id: 'p-2', targetMg: 800_000, state: 'claimed' }),
      portionWith({ id: 'p-3', state: 'done' }),
      portionWith({ id: 'p-4', state: 'void' }),
      portionWith({ id: 'p-5', lineId: 'b' }),
    ];
    expect(reachOf(first, [first, second, ...others], portions)).toEqual({
      inBagMg: 900_000,
      inLineMg: 1_900_000,
      toWeighMg: 2_000_000,
      spareMg: -100_000,
    });
  });
});
