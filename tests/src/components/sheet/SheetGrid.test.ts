import { fireEvent, render, screen, waitFor } from '@testing-library/vue';
import { createPinia, setActivePinia } from 'pinia';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { MySheet, PledgeReply, SheetReply } from '#shared/schemas/sheet.ts';
import { ids, mySheet, sheetReply } from '#tests/support/sheetReply.ts';
import * as api from 'src/api/sheet.ts';
import SheetGrid from 'src/components/sheet/SheetGrid.vue';
import { useSheetStore } from 'src/stores/sheet.ts';

vi.mock('src/api/sheet.ts');
vi.mock('src/api/socket.ts', () => ({ joinRoom: vi.fn(), onConnection: vi.fn(), onLive: vi.fn() }));

const place = { club: 'quillmere', buy: ids.buy };

async function show(
  reply: Partial<SheetReply> = {},
  mine: Partial<MySheet> = {},
  props = { onlyMine: false, search: '' },
) {
  vi.mocked(api.getSheet).mockResolvedValue(sheetReply(reply));
  vi.mocked(api.getMySheet).mockResolvedValue(mySheet(mine));
  const store = useSheetStore();
  await store.load(place);
  const view = render(SheetGrid, { props });
  await waitFor(() => expect(store.sums).not.toBeNull());
  return { store, view };
}

const cell = (row: number, column: number) => {
  const found = document.querySelector<HTMLElement>(`[data-cell="${row}:${column}"]`);
  if (!found) throw new Error(`no cell ${row}:${column}`);
  return found;
};
const words = (row: number, column: number) =>
  cell(row, column).textContent?.replace(/\s+/g, ' ').trim();
const press = (key: string) => fireEvent.keyDown(document.activeElement ?? document.body, { key });
/** The field of the cell that is edited; its part of the page comes with the first edit. */
const field = () => screen.findByRole<HTMLInputElement>('textbox');

function answerPledges() {
  vi.mocked(api.putPledge).mockImplementation((_to, lineId, membershipId, body) => {
    const { version, ...wish } = body;
    const pledge = { membershipId, name: 'x', guest: false, lineId, ...wish, version: version + 1 };
    const reply: PledgeReply = {
      sheetVersion: 8,
      pledge: { ...pledge, at: '2026-12-01T10:00:00.000Z' },
      proposed: false,
    };
    return Promise.resolve(reply);
  });
}

beforeEach(() => {
  vi.resetAllMocks();
  setActivePinia(createPinia());
});

describe('the sheet', () => {
  it('shows the own row first, the others by name, and what is below', async () => {
    await show();
    expect([0, 1, 2].map((row) => words(row, 0))).toEqual(['You', 'NVNoor Valdane', 'RRavi guest']);
    expect([words(0, 1), words(0, 2)]).toEqual(['–', '400']);
    expect(words(1, 1)).toBe('600 gets 900');
    const rows = screen
      .getAllByRole('row')
      .map((row) => row.textContent?.replace(/\s+/g, ' ').trim());
    expect(rows.find((text) => text?.startsWith('Pooled'))).toMatch(/1.600.*900/);
    expect(rows.find((text) => text?.startsWith('Pack plan'))).toMatch(/1 × 25.kg.*1 × 5.kg/);
  });

  it('is a grid for assistive technology, with one cell in the tab order', async () => {
    await show();
    const grid = screen.getByRole('grid', { name: 'Buy sheet' });
    expect(grid.getAttribute('aria-colcount')).toBe('4');
    expect(screen.getAllByRole('columnheader')).toHaveLength(4);
    expect(document.querySelectorAll('[data-cell][tabindex="0"]')).toHaveLength(1);
    expect(cell(1, 1).getAttribute('aria-readonly')).toBe('true');
    expect(cell(0, 1).getAttribute('aria-readonly')).toBeNull();
    expect(cell(1, 1).getAttribute('aria-label')).toBe(
      'Noor Valdane, Potassium nitrate: 600 g, up to 900 g',
    );
  });

  it('moves by arrows, begins to edit by typing, and keeps by Enter', async () => {
    answerPledges();
    await show();
    cell(0, 1).focus();
    await press('ArrowRight');
    expect(document.activeElement).toBe(cell(0, 2));
    await press('ArrowDown');
    expect(document.activeElement).toBe(cell(1, 2));
    await press('ArrowUp');
    await press('7');
    expect((await field()).value).toBe('7');
    await fireEvent.update(await field(), '1.2kg');
    expect((await screen.findByRole('status')).textContent).toMatch(/1.200.g/);
    await fireEvent.keyDown(await field(), { key: 'Enter' });
    expect(api.putPledge).toHaveBeenCalledExactlyOnceWith(place, ids.epsom, ids.me, {
      wantedMg: 1_200_000,
      upToMg: null,
      version: 1,
    });
    await waitFor(() => expect(words(0, 2)).toMatch(/1.200/));
    expect(document.activeElement).toBe(cell(0, 2));
  });

  it('loses nothing typed while the field is on its way', async () => {
    await show();
    cell(0, 2).focus();
    await Promise.all(['6', '5', '0'].map(press));
    expect((await field()).value).toBe('650');
  });

  it('leaves a cell as it was by Esc', async () => {
    await show();
    cell(0, 2).focus();
    await press('Enter');
    expect((await field()).value).toBe('400');
    await fireEvent.update(await field(), '999');
    await fireEvent.keyDown(await field(), { key: 'Escape' });
    expect(screen.queryByRole('textbox')).toBeNull();
    expect(words(0, 2)).toBe('400');
    expect(api.putPledge).not.toHaveBeenCalled();
    await waitFor(() => expect(document.activeElement).toBe(cell(0, 2)));
  });

  it('keeps what was typed while it can not be read, and offers both readings', async () => {
    answerPledges();
    await show();
    cell(0, 2).focus();
    await press('Enter');
    await fireEvent.update(await field(), '1,500');
    await fireEvent.keyDown(await field(), { key: 'Enter' });
    expect((await field()).getAttribute('aria-invalid')).toBe('true');
    expect(api.putPledge).not.toHaveBeenCalled();
    await fireEvent.click(await screen.findByRole('button', { name: /1.500.g/ }));
    expect(vi.mocked(api.putPledge).mock.calls[0]?.[3].wantedMg).toBe(1_500_000);
  });

  it("opens no one else's cell to a member, and every one to the organiser", async () => {
    const first = await show();
    await fireEvent.click(cell(1, 2));
    expect(screen.queryByRole('textbox')).toBeNull();
    first.view.unmount();
    setActivePinia(createPinia());
    answerPledges();
    await show({}, { may: { ...mySheet().may, pledgeForOthers: true } });
    await fireEvent.click(cell(1, 2));
    await fireEvent.update(await field(), '450');
    await fireEvent.keyDown(await field(), { key: 'Enter' });
    expect(vi.mocked(api.putPledge).mock.calls[0]?.slice(1, 3)).toEqual([ids.epsom, ids.noor]);
  });

  it('edits nothing once the buy is frozen or past its time', async () => {
    const terms = { ...sheetReply().terms, closesAt: new Date(Date.now() - 1000).toISOString() };
    await show({ terms });
    await fireEvent.click(cell(0, 2));
    expect(screen.queryByRole('textbox')).toBeNull();
  });

  it('says beside the cell why a change was not kept', async () => {
    const { ApiProblem } = await import('src/api/problem.ts');
    vi.mocked(api.putPledge).mockRejectedValue(
      new ApiProblem({
        status: 409,
        code: 'buy_locked',
        title: 'No',
        detail: 'It locked a moment ago.',
      }),
    );
    await show();
    cell(0, 2).focus();
    await press('5');
    await fireEvent.keyDown(await field(), { key: 'Enter' });
    await waitFor(() => expect(words(0, 2)).toBe('400 not kept'));
    expect(cell(0, 2).getAttribute('aria-description')).toBe('It locked a moment ago.');
  });

  it('narrows to own lines and to the members looked for', async () => {
    await show({}, {}, { onlyMine: true, search: 'noor' });
    expect(screen.getAllByRole('columnheader')).toHaveLength(3);
    expect(words(1, 0)).toMatch('Noor');
    expect(document.querySelector('[data-cell="2:0"]')).toBeNull();
  });

  it('gathers many members in one row until they are asked for', async () => {
    const many = Array.from({ length: 40 }, (_, index) => ({
      membershipId: `m${index}`,
      name: `Member ${String(index).padStart(2, '0')}`,
      guest: false,
      pledges: [[1, 10_000, null, 1, index]] as SheetReply['members'][number]['pledges'],
    }));
    await show({ members: many });
    expect(document.querySelectorAll('[data-cell$=":0"]')).toHaveLength(10);
    await fireEvent.click(screen.getByRole('button', { name: '31 more members' }));
    await waitFor(() => expect(document.querySelectorAll('[data-cell$=":0"]')).toHaveLength(41));
  });
});
