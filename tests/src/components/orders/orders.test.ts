import { fireEvent, render, screen, waitFor, within } from '@testing-library/vue';
import { describe, expect, it, vi } from 'vitest';
import type { LockedMember, LockedReply, ShareChange } from '#shared/schemas/orders.ts';
import { ApiProblem } from 'src/api/problem.ts';
import LockedMembers from 'src/components/orders/LockedMembers.vue';
import PriceAnswer from 'src/components/orders/PriceAnswer.vue';
import SharesTable from 'src/components/orders/SharesTable.vue';
import type { OrderActs } from 'src/stores/orderActs.ts';

const share = (fields: Partial<ShareChange> = {}): ShareChange => ({
  memberId: 'ana',
  name: 'Ana',
  lockedMinor: 1000,
  oldMinor: 1000,
  newMinor: 1150,
  overLimit: true,
  agreed: false,
  ...fields,
});

describe('SharesTable', () => {
  it('says old, new, difference and per cent, and who is past the limit', () => {
    render(SharesTable, {
      props: {
        label: 'Shares',
        shares: [
          share(),
          share({ memberId: 'ben', name: 'Ben', newMinor: 1000, overLimit: false }),
        ],
      },
    });
    const [, first, second] = within(screen.getByRole('table', { name: 'Shares' })).getAllByRole(
      'row',
    );
    expect(first?.textContent).toMatch(/Ana.*Past the limit.*10\.00.*11\.50.*\+1\.50.*\+15/);
    expect(second?.textContent).toContain('±0');
  });
});

describe('PriceAnswer', () => {
  const show = (answerPrice: OrderActs['answerPrice']) =>
    render(PriceAnswer, {
      props: {
        acts: { answerPrice } as OrderActs,
        lockedMinor: 1000,
        shareMinor: 1150,
        limitPermille: 100,
      },
    });

  it('agrees to exactly the share that it shows', async () => {
    const answer = vi.fn().mockResolvedValue(undefined);
    const { emitted } = show(answer);
    await fireEvent.click(screen.getByRole('button', { name: /Agree to/ }));
    await waitFor(() => expect(emitted('done')).toHaveLength(1));
    expect(answer).toHaveBeenCalledWith(true, 1150);
  });

  it('keeps a refusal beside the buttons', async () => {
    const stale = new ApiProblem({
      status: 409,
      code: 'stale',
      title: 'It has changed',
      detail: 'Your share has changed since you opened the page.',
    });
    const { emitted } = show(vi.fn().mockRejectedValue(stale));
    await fireEvent.click(screen.getByRole('button', { name: /Agree to/ }));
    expect(await screen.findByText(/Your share has changed since/)).toBeTruthy();
    expect(emitted('done')).toBeUndefined();
  });
});

const member = (id: string, fields: Partial<LockedMember> = {}): LockedMember => ({
  id,
  name: id,
  guest: false,
  shareMinor: 1000,
  lockedMinor: 1000,
  dropped: false,
  money: {
    dueMinor: 1000,
    paidMinor: 0,
    openMinor: 1000,
    vouchedBy: null,
    vouchedReason: null,
    remindedAt: null,
  },
  mustAgree: false,
  agreedMinor: null,
  ...fields,
});
const may: LockedReply['may'] = {
  seeMoney: true,
  vouch: true,
  drop: true,
  remind: true,
  noteCash: true,
  reopen: true,
  recordPayment: false,
};
const locked = (
  members: LockedMember[],
  rights: Partial<LockedReply['may']> = {},
): LockedReply => ({
  state: 'locked',
  termsVersion: 3,
  dueAt: null,
  lockedAt: null,
  priceLimitPermille: 100,
  ordersPlaced: false,
  members,
  slip: null,
  plan: [],
  totals: { shareMinor: 3000, shelfMinor: 0, paidMinor: 1000, openMinor: 2000 },
  pay: { transferHow: '', reference: '' },
  may: { ...may, ...rights },
});

describe('LockedMembers', () => {
  const paid = { ...member('x').money, paidMinor: 1000, openMinor: 0 } as LockedMember['money'];

  it('puts the reader first, then who owes, the dropped last', () => {
    render(LockedMembers, {
      props: {
        modelValue: [],
        youId: 'you',
        locked: locked([
          member('gone', { dropped: true }),
          member('paid', { money: paid }),
          member('owes'),
          member('you', { money: paid }),
        ]),
      },
    });
    const names = screen.getAllByRole('listitem').map((row) => row.textContent);
    expect(names.map((text) => /you|owes|paid|gone/.exec(text ?? '')?.[0]).filter(Boolean)).toEqual(
      ['you', 'owes', 'paid', 'gone'],
    );
  });

  it('lets only who owes be chosen', async () => {
    const { emitted } = render(LockedMembers, {
      props: {
        modelValue: [],
        youId: '',
        locked: locked([member('owes'), member('paid', { money: paid })]),
      },
    });
    expect(screen.queryByRole('checkbox', { name: 'Choose paid' })).toBeNull();
    await fireEvent.click(screen.getByRole('checkbox', { name: 'Choose owes' }));
    expect(emitted('update:modelValue')).toEqual([[['owes']]]);
  });

  it('shows no payments to who may not see them', () => {
    render(LockedMembers, {
      props: {
        modelValue: [],
        youId: 'you',
        locked: locked([member('you'), member('other', { money: null })], {
          seeMoney: false,
          drop: false,
          remind: false,
        }),
      },
    });
    expect(screen.queryByText('Paid')).toBeNull();
    const other = screen.getAllByRole('listitem').find((row) => row.textContent?.includes('other'));
    expect(other?.textContent).not.toMatch(/To pay|Paid/);
  });
});
