import { render, screen } from '@testing-library/vue';
import { describe, expect, it } from 'vitest';
import type { Statement } from '#shared/schemas/ledger.ts';
import PayByTransfer from 'src/components/ledger/PayByTransfer.vue';
import StatementEntries from 'src/components/ledger/StatementEntries.vue';
import StatementSums from 'src/components/ledger/StatementSums.vue';

const statement = (fields: Partial<Statement> = {}): Statement => ({
  member: { id: 'ana', name: 'Ana', guest: false },
  balanceMinor: 0,
  openMinor: 0,
  accountOpenMinor: 0,
  carriedMinor: 0,
  creditMinor: 0,
  buys: [],
  entries: [],
  transferHow: '',
  club: { name: 'Fen Gardeners' },
  ...fields,
});
const entry = (id: string, amountMinor: number, balanceMinor: number) => ({
  id,
  onDate: '2026-11-20',
  memo: `Entry ${id}`,
  buyName: null,
  amountMinor,
  balanceMinor,
  reversal: id === '2',
});

describe('PayByTransfer', () => {
  it('offers the exact amount and the grouped reference to copy', () => {
    render(PayByTransfer, {
      props: {
        amountMinor: 1543,
        reference: 'RF637BW43TQZ6115X25O',
        transferHow: 'IBAN DE02 1203 0000 0000 2020 51',
      },
    });
    expect(screen.getByLabelText<HTMLInputElement>('Amount', { selector: 'input' }).value).toBe(
      '15.43',
    );
    expect(screen.getByLabelText<HTMLInputElement>('Reference', { selector: 'input' }).value).toBe(
      'RF63 7BW4 3TQZ 6115 X25O',
    );
    expect(screen.getByText(/IBAN DE02/)).toBeTruthy();
  });

  it('says so when the club has not said how to pay', () => {
    render(PayByTransfer, { props: { amountMinor: 1, reference: 'RF', transferHow: '' } });
    expect(screen.getByText(/hasn’t said how to pay/)).toBeTruthy();
  });
});

describe('a statement', () => {
  it('says what is to pay, or what is credit, never both', () => {
    const { rerender } = render(StatementSums, {
      props: { own: true, statement: statement({ openMinor: 500 }) },
    });
    expect(screen.getByText('To pay')).toBeTruthy();
    expect(screen.queryByText('Credit')).toBeNull();
    return rerender({ own: true, statement: statement({ creditMinor: 250 }) }).then(() => {
      expect(screen.getByText('Credit')).toBeTruthy();
      expect(screen.queryByText('To pay')).toBeNull();
    });
  });

  it('lists entries newest first and marks what was taken back', () => {
    render(StatementEntries, {
      props: { entries: [entry('1', -500, -500), entry('2', 500, 0)] },
    });
    const text = document.body.textContent ?? '';
    expect(text.indexOf('Taken back: Entry 2')).toBeGreaterThan(-1);
    expect(text.indexOf('Taken back: Entry 2')).toBeLessThan(text.indexOf('Entry 1'));
  });
});
