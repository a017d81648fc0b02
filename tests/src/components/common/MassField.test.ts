import { fireEvent, screen } from '@testing-library/vue';
import { describe, expect, it } from 'vitest';
import { nextTick } from 'vue';
import { mountField } from '#tests/support/fieldHost.ts';
import MassField from 'src/components/common/MassField.vue';

const show = (props: Record<string, unknown> = {}) =>
  mountField(MassField, { label: 'I want', ...props });

describe('MassField', () => {
  it.each([
    ['1.2kg', 1_200_000],
    ['800', 800_000],
    ['0,5 kg', 500_000],
    ['12.5', 12_500],
  ])('reads %s', async (typed, mg) => {
    const { field, seen } = show();
    await fireEvent.update(field, typed);
    expect(seen.at(-1)).toBe(mg);
  });

  it('echoes what it read when that is not what was typed', async () => {
    const { field } = show();
    await fireEvent.update(field, '1.2kg');
    expect(screen.getByText(/Read as 1\s200\sg/)).toBeTruthy();
    expect(field.value).toBe('1.2kg');
  });

  it('refuses a mark before three digits and offers both readings', async () => {
    const { field, seen, commits } = show();
    await fireEvent.update(field, '1.200');
    expect(seen).toEqual([]);
    const keys = screen.getAllByRole('button').map((key) => key.textContent?.replace(/\s/g, ' '));
    expect(keys).toEqual(['1.2 g', '1 200 g']);
    await fireEvent.click(screen.getByRole('button', { name: /1\s200/ }));
    expect(seen).toEqual([1_200_000]);
    expect(commits).toEqual([1_200_000]);
    expect(screen.queryByRole('button')).toBeNull();
  });

  it('keeps the last good value while what is typed breaks the step', async () => {
    const { field, seen } = show({ stepMg: 50_000, start: 100_000 });
    await fireEvent.update(field, '120');
    await fireEvent.keyDown(field, { key: 'Enter' });
    expect(seen).toEqual([]);
    expect(await screen.findByText(/In steps of 50\sg: 100\sg or 150\sg\./)).toBeTruthy();
  });

  it('is emptied to null', async () => {
    const { field, seen } = show({ start: 100_000 });
    expect(field.value).toBe('100');
    await fireEvent.update(field, '');
    expect(seen).toEqual([null]);
  });

  it('commits on Enter, and not what it could not read', async () => {
    const { field, commits } = show();
    await fireEvent.update(field, 'a lot');
    await fireEvent.keyDown(field, { key: 'Enter' });
    expect(commits).toEqual([]);
    await fireEvent.update(field, '300');
    await fireEvent.keyDown(field, { key: 'Enter' });
    expect(commits).toEqual([300_000]);
  });

  it('shows a change from elsewhere', async () => {
    const { field, model } = show({ start: 100_000 });
    model.value = 2_500_000;
    await nextTick();
    expect(field.value).toBe('2500');
  });
});
