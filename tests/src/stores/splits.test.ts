import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { SplitChange } from '#shared/schemas/splits.ts';
import { getSplit } from 'src/api/splits.ts';
import { useSplitsStore } from 'src/stores/splits.ts';
import { bagWith, portionWith, sheetWith } from '#tests/support/splitSheets.ts';

vi.mock('src/api/splits.ts', () => ({ getSplit: vi.fn() }));
vi.mock('src/api/buys.ts', () => ({ getBuy: vi.fn(() => Promise.reject(new Error('none'))) }));

const change = (splitVersion: number, changes: Partial<SplitChange> = {}): SplitChange => ({
  buyId: 'buy',
  splitVersion,
  bags: [],
  portions: [],
  partly: false,
  ...changes,
});
const asked = vi.mocked(getSplit);

beforeEach(async () => {
  vi.useFakeTimers();
  setActivePinia(createPinia());
  asked.mockReset();
  asked.mockResolvedValue(sheetWith());
  await useSplitsStore().load({ club: 'fen', buy: 'buy' });
  asked.mockClear();
});
afterEach(() => vi.useRealTimers());

describe('useSplitsStore', () => {
  it('takes the next change as it comes', () => {
    const store = useSplitsStore();
    store.receive(change(8, { portions: [portionWith({ version: 2, state: 'claimed' })] }));
    const sheet = store.sheetOf('buy');
    expect(sheet?.splitVersion).toBe(8);
    expect(sheet?.portions).toMatchObject([{ id: 'p-1', state: 'claimed' }]);
    vi.advanceTimersByTime(1000);
    expect(asked).not.toHaveBeenCalled();
  });

  it('never goes back to an older record, whatever comes last', () => {
    const store = useSplitsStore();
    store.receive(change(8, { portions: [portionWith({ version: 3, state: 'done' })] }));
    store.receive(change(8, { portions: [portionWith({ version: 2, state: 'claimed' })] }));
    expect(store.sheetOf('buy')?.portions[0]?.state).toBe('done');
  });

  it('asks for the whole after a gap, and when there is more than was told', async () => {
    const store = useSplitsStore();
    store.receive(change(10));
    expect(store.sheetOf('buy')?.splitVersion).toBe(7);
    await vi.advanceTimersByTimeAsync(250);
    expect(asked).toHaveBeenCalledTimes(1);
    store.receive(change(8, { partly: true }));
    await vi.advanceTimersByTimeAsync(250);
    expect(asked).toHaveBeenCalledTimes(2);
  });

  it('puts new parts among the others by their codes', () => {
    const store = useSplitsStore();
    store.receive(
      change(8, {
        portions: [
          portionWith({ id: 'p-9', code: '0094' }),
          portionWith({ id: 'p-3', code: '0032' }),
        ],
        bags: [bagWith({ version: 2, portionsMg: 600_000 })],
      }),
    );
    const sheet = store.sheetOf('buy');
    expect(sheet?.portions.map(({ code }) => code)).toEqual(['0016', '0032', '0094']);
    expect(sheet?.bags[0]?.portionsMg).toBe(600_000);
  });
});
