import { fireEvent, render, screen } from '@testing-library/vue';
import { createPinia, setActivePinia } from 'pinia';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import BagTable from 'src/components/splits/BagTable.vue';
import { ApiProblem } from 'src/api/problem.ts';
import type { SplitActs } from 'src/stores/splitActs.ts';
import { bagWith, lineWith, noChange } from '#tests/support/splitSheets.ts';

const countBag = vi.fn<SplitActs['countBag']>();
const empty = { grossMg: null, tareMg: null, tareAssumed: true, netMg: null, lot: '' };

function open() {
  render(BagTable, {
    props: {
      lines: [lineWith()],
      bags: [
        bagWith(empty),
        bagWith({ ...empty, id: 'bag-2', number: 2, missing: true }),
        bagWith({ ...empty, id: 'bag-3', number: 3 }),
      ],
      club: 'fen',
      acts: { countBag } as Partial<SplitActs> as SplitActs,
      editable: true,
    },
    global: { stubs: { UploadList: true } },
  });
  return screen.getAllByLabelText<HTMLInputElement>('Gross');
}

beforeEach(() => {
  setActivePinia(createPinia());
  countBag.mockReset().mockResolvedValue(noChange);
});

describe('BagTable', () => {
  it('saves with Enter and goes to the next bag that is here', async () => {
    const [first, , third] = open();
    await fireEvent.update(first!, '25.1kg');
    expect(screen.getByText('Not saved')).toBeTruthy();
    expect(screen.getByText(/0\.5 % assumed/)).toBeTruthy();
    await fireEvent.keyDown(first!, { key: 'Enter' });
    await vi.waitFor(() => expect(document.activeElement).toBe(third));
    expect(countBag).toHaveBeenCalledWith('bag-1', {
      version: 1,
      grossMg: 25_100_000,
      tareMg: null,
      lot: '',
      missing: false,
      damage: '',
      note: '',
    });
  });

  it('stays in the row, says what is wrong, and keeps what was typed', async () => {
    countBag.mockRejectedValue(
      new ApiProblem({
        status: 409,
        code: 'stale',
        title: 'Changed meanwhile',
        detail: 'Somebody changed this bag meanwhile. Look at it again.',
      }),
    );
    const [first, , third] = open();
    await fireEvent.update(first!, '25');
    await fireEvent.keyDown(first!, { key: 'Enter' });
    await vi.waitFor(() => expect(screen.getByText(/Somebody changed this bag/)).toBeTruthy());
    expect(document.activeElement).not.toBe(third);
    expect(first!.value).toBe('25');
    await fireEvent.click(screen.getByRole('button', { name: 'Show what stands now' }));
    await vi.waitFor(() => expect(first!.value).toBe(''));
  });
});
