import { fireEvent } from '@testing-library/vue';
import { describe, expect, it } from 'vitest';
import { mountField } from '#tests/support/fieldHost.ts';
import MoneyField from 'src/components/common/MoneyField.vue';

const show = (props: Record<string, unknown>) =>
  mountField(MoneyField, { label: 'Price', ...props });

describe('MoneyField', () => {
  it.each([
    ['EUR', '12,50', 1250],
    ['JPY', '1200', 1200],
    ['KWD', '1.2', 1200],
  ])('reads %s %s as whole minor units', async (currency, typed, minor) => {
    const { field, seen } = show({ currency });
    await fireEvent.update(field, typed);
    expect(seen.at(-1)).toBe(minor);
  });

  it('takes a rebate only where one may be', async () => {
    const plain = show({ currency: 'EUR' });
    await fireEvent.update(plain.field, '-1.20');
    expect(plain.seen).toEqual([]);
  });

  it('reads a rebate', async () => {
    const { field, seen } = show({ currency: 'EUR', minMinor: -10_000 });
    await fireEvent.update(field, '-1.20');
    expect(seen.at(-1)).toBe(-120);
  });
});
