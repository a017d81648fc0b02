import { fireEvent, render, screen, waitFor, within } from '@testing-library/vue';
import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { createMemoryHistory, createRouter } from 'vue-router';
import type { Member, MembersReply } from '#shared/schemas/members.ts';
import MemberDialog from 'src/components/clubs/MemberDialog.vue';
import MembersTable from 'src/components/clubs/MembersTable.vue';
import { useMembersStore } from 'src/stores/members.ts';

const none = { organiser: false, treasurer: false, steward: false };
const member = (displayName: string, over: Partial<Member> = {}): Member => ({
  id: displayName,
  displayName,
  status: 'active',
  roles: none,
  isGuest: false,
  you: false,
  joinedAt: '2026-12-01T18:00:00.000Z',
  endedAt: null,
  email: null,
  contact: null,
  vouchedBy: null,
  balanceMinor: null,
  lastOf: [],
  version: 1,
  ...over,
});

const router = createRouter({
  history: createMemoryHistory(),
  routes: [{ path: '/:all(.*)*', component: { render: () => null } }],
});

function answer(status: number, body: unknown) {
  return new Response(JSON.stringify(body), { status });
}

beforeEach(() => {
  vi.stubGlobal('matchMedia', () => ({
    matches: true,
    addEventListener: () => {},
    removeEventListener: () => {},
  }));
  setActivePinia(createPinia());
});
afterEach(() => {
  vi.unstubAllGlobals();
  document.body.innerHTML = '';
});

describe('MembersTable', () => {
  const list = (may: Partial<MembersReply['may']>): MembersReply => ({
    may: { manage: false, seeEmails: false, seeBalances: false, ...may },
    members: [
      member('Noor', { email: 'noor@quillmere.example', balanceMinor: 1496 }),
      member('Ravi', { roles: { ...none, organiser: true }, balanceMinor: -250 }),
      member('Wim', { isGuest: true }),
    ],
  });
  const show = (may: Partial<MembersReply['may']> = {}) =>
    render(MembersTable, { props: { list: list(may) }, global: { plugins: [router] } });
  const heads = () =>
    screen.getAllByRole('columnheader').map(({ textContent }) => textContent?.trim());
  const names = () =>
    screen
      .getAllByRole('row')
      .slice(1)
      .map((row) => within(row).getAllByRole('cell')[0]?.textContent ?? '');

  it('has a balance and an act only for those who may', () => {
    show();
    expect(heads()).toEqual(['Name', 'Roles', 'In the club since']);
    expect(screen.queryByRole('button', { name: 'Manage Noor' })).toBeNull();
  });

  it('says owed and credit, and asks to manage', async () => {
    const { emitted } = show({ manage: true, seeBalances: true });
    expect(heads()).toEqual(['Name', 'Roles', 'Balance, EUR', 'In the club since', 'Manage']);
    expect(screen.getByText('14.96 owed')).toBeTruthy();
    expect(screen.getByText('2.50 credit')).toBeTruthy();
    await fireEvent.click(screen.getByRole('button', { name: 'Manage Ravi' }));
    expect(emitted().manage?.[0]).toMatchObject([{ displayName: 'Ravi' }]);
  });

  it('finds by name, role and address, and sorts', async () => {
    show();
    await fireEvent.update(screen.getByLabelText('Search members'), 'noor@quill');
    await waitFor(() => expect(names()).toHaveLength(1));
    expect(names()[0]).toContain('Noor');
    await fireEvent.update(screen.getByLabelText('Search members'), '');
    await waitFor(() => expect(names()).toHaveLength(3));
    await fireEvent.click(screen.getByRole('columnheader', { name: 'Name' }));
    await fireEvent.click(screen.getByRole('columnheader', { name: 'Name' }));
    expect(names()[0]).toContain('Wim');
  });
});

describe('MemberDialog', () => {
  const open = (who: Member) =>
    render(MemberDialog, {
      props: { club: 'quillmere', member: who, modelValue: true, 'onUpdate:modelValue': () => {} },
      global: { plugins: [router] },
    });

  it("protects the last of a role, and saves what changed over the member's version", async () => {
    const roles = { ...none, steward: true };
    const fetched = vi.fn(async () =>
      answer(200, { members: [], may: { manage: true, seeEmails: true, seeBalances: false } }),
    );
    vi.stubGlobal('fetch', fetched);
    open(member('Stig', { roles, lastOf: ['steward'], version: 7 }));
    const box = (name: string) => screen.findByRole('checkbox', { name });
    expect((await box('steward')).getAttribute('aria-disabled')).toBe('true');
    expect(screen.getByText(/Nobody else has this role/)).toBeTruthy();
    const save = screen.getByRole('button', { name: 'Save the roles' });
    expect(save.hasAttribute('disabled')).toBe(true);
    await fireEvent.click(await box('treasurer'));
    await fireEvent.submit(save.closest('form') as HTMLFormElement);
    await waitFor(() => expect(fetched).toHaveBeenCalledOnce());
    const [url, init] = fetched.mock.calls[0] as unknown as [string, RequestInit];
    expect([init.method, url]).toEqual(['PUT', '/api/v1/clubs/quillmere/members/Stig/roles']);
    expect(JSON.parse(String(init.body))).toEqual({
      roles: { organiser: false, treasurer: true, steward: true },
      version: 7,
    });
    expect(useMembersStore().listOf('quillmere')?.may.manage).toBe(true);
  });

  it('offers the roles as they are when somebody else changed them', async () => {
    vi.stubGlobal('fetch', async () =>
      answer(409, {
        status: 409,
        code: 'stale',
        title: 'Changed meanwhile',
        detail: 'Stig was changed.',
      }),
    );
    open(member('Stig'));
    await fireEvent.click(await screen.findByRole('checkbox', { name: 'organiser' }));
    const save = screen.getByRole('button', { name: 'Save the roles' });
    await fireEvent.submit(save.closest('form') as HTMLFormElement);
    expect(await screen.findByText(/Stig was changed/)).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Show the roles as they are now' })).toBeTruthy();
  });
});
