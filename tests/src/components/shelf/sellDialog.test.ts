import { fireEvent, screen } from '@testing-library/vue';
import { enableAutoUnmount, mount, type VueWrapper } from '@vue/test-utils';
import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { nextTick } from 'vue';
import type { Shelf, ShelfStock } from '#shared/schemas/shelf.ts';
import SearchSelect from 'src/components/clubs/SearchSelect.vue';
import SellDialog from 'src/components/shelf/SellDialog.vue';

const stock: ShelfStock = {
  id: '00000000-0000-4000-8000-0000000000d1',
  saltId: 'KNO3',
  salt: 'Potassium nitrate',
  formula: 'KNO3',
  signalWord: 'Warning',
  hazards: [],
  classified: true,
  reportable: true,
  lot: 'TI-2601',
  buyName: 'Autumn refill 2026',
  origin: 'left_over',
  mg: 1_312_000,
  priceMinorPerKg: 420,
  version: 2,
};
const people: Shelf['people'] = [
  { membershipId: 'm1', name: 'Noor', isGuest: false, legalNameKnown: true, confirmed: ['KNO3'] },
  { membershipId: 'm2', name: 'Wim', isGuest: true, legalNameKnown: false, confirmed: [] },
];

beforeEach(() => setActivePinia(createPinia()));

let dialog: VueWrapper;
async function show() {
  dialog = mount(SellDialog, {
    props: { modelValue: true, club: 'quillmere', stock, people, care: [] },
    attachTo: document.body,
  });
  await screen.findByLabelText('Weighed');
}
enableAutoUnmount(afterEach);
const sellButton = () => screen.getByRole<HTMLButtonElement>('button', { name: /^Sell/ });

async function choose(name: string) {
  const id = people.find((person) => person.name === name)?.membershipId;
  dialog.findComponent(SearchSelect).vm.$emit('update:modelValue', id);
  await nextTick();
}

describe('selling from the shelf', () => {
  it('shows the price as the grams are typed', async () => {
    await show();
    await fireEvent.update(screen.getByLabelText('Weighed'), '150');
    expect(screen.getByRole('status').textContent).toMatch(/0\.63/);
    await fireEvent.update(screen.getByLabelText('Weighed'), '1.2kg');
    expect(screen.getByRole('status').textContent).toMatch(/5\.04/);
  });

  it('asks a buyer who has confirmed nothing for paper and legal name', async () => {
    await show();
    await fireEvent.update(screen.getByLabelText('Weighed'), '150');
    await choose('Noor');
    expect(screen.queryByLabelText(/Legal name/)).toBeNull();
    expect(sellButton().disabled).toBe(false);
    await choose('Wim');
    expect(sellButton().disabled).toBe(true);
    await fireEvent.click(screen.getByRole('checkbox', { name: /signed them on paper/ }));
    await fireEvent.update(screen.getByLabelText(/Legal name of Wim/), 'Wim Hazelbrook');
    expect(sellButton().disabled).toBe(false);
  });

  it('sells no more than lies there', async () => {
    await show();
    await choose('Noor');
    await fireEvent.update(screen.getByLabelText('Weighed'), '1312.1');
    expect(sellButton().disabled).toBe(true);
  });
});
