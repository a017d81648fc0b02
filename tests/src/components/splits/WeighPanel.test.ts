import { fireEvent, render, screen } from '@testing-library/vue';
import { createPinia, setActivePinia } from 'pinia';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { SplitActs } from 'src/stores/splitActs.ts';
import WeighPanel from 'src/components/splits/WeighPanel.vue';
import { useStation } from 'src/components/splits/useStation.ts';
import { ApiProblem } from 'src/api/problem.ts';
import { lineWith, noChange, portionWith, sheetWith } from '#tests/support/splitSheets.ts';

const weigh = vi.fn<SplitActs['weigh']>();
const kept = vi.fn<(portionId: string) => void>();
const claim = vi.fn<SplitActs['claim']>(() => Promise.resolve(noChange));

function open(changes: Parameters<typeof portionWith>[0] = {}) {
  const portion = portionWith(changes);
  return render(WeighPanel, {
    props: {
      sheet: sheetWith({ portions: [portion] }),
      portion,
      line: lineWith(),
      me: 'hal',
      organises: false,
      acts: { weigh, claim } as Partial<SplitActs> as SplitActs,
      bag: 'bag-1',
      kept,
    },
  });
}
const reading = () => screen.getByLabelText<HTMLInputElement>('Scale shows');
const keep = () => screen.getByRole<HTMLButtonElement>('button', { name: /Keep|looked/ });

beforeEach(() => {
  setActivePinia(createPinia());
  weigh.mockReset().mockResolvedValue(noChange);
  claim.mockClear();
  kept.mockClear();
  useStation().value = { name: 'Table 1', scale: 'Blue', divisionMg: 100, capacityMg: 2_000_000 };
});

describe('WeighPanel', () => {
  it('claims as soon as somebody goes to weigh, and keeps a reading within the band', async () => {
    open();
    await fireEvent.focusIn(reading());
    expect(claim).toHaveBeenCalledWith('p-1', 'Table 1');
    await fireEvent.update(reading(), '1201.4');
    expect(screen.getByText('Within the band.')).toBeTruthy();
    await fireEvent.submit(reading().form!);
    await vi.waitFor(() => expect(weigh).toHaveBeenCalledTimes(1));
    expect(weigh.mock.calls[0]?.[0]).toMatchObject({
      portionId: 'p-1',
      bagId: 'bag-1',
      readingMg: 1_201_400,
      targetMg: 1_200_000,
      targetVersion: 1,
      divisionMg: 100,
      capacityMg: 2_000_000,
      secondLook: false,
    });
  });

  it('tells which portion was kept, also when the next one is on the scale by then', async () => {
    let answer = () => {};
    weigh.mockReturnValue(
      new Promise((resolve) => {
        answer = () => resolve(noChange);
      }),
    );
    const { unmount } = open();
    await fireEvent.update(reading(), '1200');
    await fireEvent.submit(reading().form!);
    await vi.waitFor(() => expect(weigh).toHaveBeenCalledTimes(1));
    unmount();
    expect(kept).not.toHaveBeenCalled();
    answer();
    await vi.waitFor(() => expect(kept).toHaveBeenCalledWith('p-1'));
  });

  it('keeps nothing above the band', async () => {
    open();
    await fireEvent.update(reading(), '1206.1');
    expect(screen.getByText(/too much: scoop some back/)).toBeTruthy();
    expect(keep().disabled).toBe(true);
  });

  it('wants a second look below the band, and another one for another reading', async () => {
    open();
    await fireEvent.update(reading(), '1190');
    expect(keep().textContent).toContain('I looked again');
    await fireEvent.submit(reading().form!);
    await vi.waitFor(() => expect(keep().textContent).toContain('Keep it as weighed'));
    expect(weigh).not.toHaveBeenCalled();
    await fireEvent.update(reading(), '1191');
    await vi.waitFor(() => expect(keep().textContent).toContain('I looked again'));
    await fireEvent.submit(reading().form!);
    await vi.waitFor(() => expect(keep().textContent).toContain('Keep it as weighed'));
    await fireEvent.submit(reading().form!);
    await vi.waitFor(() => expect(weigh).toHaveBeenCalledTimes(1));
    expect(weigh.mock.calls[0]?.[0]).toMatchObject({ readingMg: 1_191_000, secondLook: true });
  });

  it('sends the same weighing again under the same id when no answer came', async () => {
    weigh.mockRejectedValueOnce(
      new ApiProblem({ status: 0, code: 'offline', title: 'No connection' }),
    );
    open();
    await fireEvent.update(reading(), '1200');
    await fireEvent.submit(reading().form!);
    await vi.waitFor(() => expect(screen.getByText('No connection')).toBeTruthy());
    await fireEvent.submit(reading().form!);
    await vi.waitFor(() => expect(weigh).toHaveBeenCalledTimes(2));
    expect(weigh.mock.calls[0]?.[0].id).toBe(weigh.mock.calls[1]?.[0].id);
  });

  it('offers to cut what the scale can’t carry', () => {
    useStation().value.capacityMg = 1_000_000;
    open();
    expect(screen.getByText(/more than your scale carries/)).toBeTruthy();
    expect(screen.getByRole('button', { name: /Cut it for this scale/ })).toBeTruthy();
    expect(keep().disabled).toBe(true);
  });

  it('shows who else weighs a portion, and no field', () => {
    open({
      state: 'claimed',
      claimedBy: { membershipId: 'orla', name: 'Orla F.' },
      station: 'Table 2',
    });
    expect(screen.getByText(/Orla F\. weighs this portion\s+on Table 2/)).toBeTruthy();
    expect(screen.queryByLabelText('Scale shows')).toBeNull();
  });
});
