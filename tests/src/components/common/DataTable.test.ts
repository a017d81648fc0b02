import { fireEvent, render, screen } from '@testing-library/vue';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { createMemoryHistory, createRouter } from 'vue-router';
import DataTable from 'src/components/common/DataTable.vue';

const rows = [
  { id: 1, name: 'Noor Valdane', grams: 600 },
  { id: 2, name: 'Ravi Achterlo', grams: 1000 },
];
const columns = [
  { name: 'name', label: 'Member', field: 'name' },
  { name: 'grams', label: 'Grams', field: 'grams', format: (grams: number) => `${grams} g` },
];

function show(wide: boolean, props: object = {}) {
  vi.stubGlobal('matchMedia', () => ({
    matches: wide,
    addEventListener: () => {},
    removeEventListener: () => {},
  }));
  const router = createRouter({
    history: createMemoryHistory(),
    routes: [{ path: '/:all(.*)*', component: { render: () => null } }],
  });
  render(DataTable, {
    props: { rows, columns, rowKey: 'id', label: 'members', ...props },
    global: { plugins: [router] },
  });
  return router;
}

afterEach(() => vi.unstubAllGlobals());

describe('DataTable', () => {
  it('is a table where there is room', () => {
    show(true);
    expect(screen.getAllByRole('columnheader').map((head) => head.textContent)).toEqual([
      'Member',
      'Grams',
    ]);
    expect(screen.getByText('600 g')).toBeTruthy();
  });

  it('is cards that name each value on a phone', () => {
    show(false);
    expect(screen.queryByRole('table')).toBeNull();
    expect(screen.getAllByText('Grams')).toHaveLength(2);
    expect(screen.getByText('1000 g')).toBeTruthy();
  });

  it('says so when there is nothing', () => {
    show(true, { rows: [] });
    expect(screen.getByText('Nothing here yet.')).toBeTruthy();
  });

  it('goes to a row’s page', async () => {
    const router = show(true, { rowTo: (row: { id: number }) => `/members/${row.id}` });
    const push = vi.spyOn(router, 'push');
    await fireEvent.click(screen.getByText('Ravi Achterlo'));
    expect(push).toHaveBeenCalledWith('/members/2');
  });
});
