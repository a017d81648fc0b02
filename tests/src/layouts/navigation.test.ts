import { createPinia, setActivePinia } from 'pinia';
import { mount } from '@vue/test-utils';
import { beforeEach, describe, expect, it } from 'vitest';
import { defineComponent } from 'vue';
import { createMemoryHistory, createRouter } from 'vue-router';
import { useNavigation } from 'src/layouts/navigation.ts';
import { routes } from 'src/router/routes.ts';
import { useSessionStore } from 'src/stores/session.ts';

type Status = 'active' | 'left' | 'removed';

/** Labels of the places and of what lies under them, for a member of this standing. */
function placesOf(status: Status, roles = { organiser: false, treasurer: false, steward: false }) {
  const session = useSessionStore();
  session.receive({
    account: { id: 'a', displayName: 'Noor', email: 'noor@club.example' },
    memberships: [
      {
        clubId: 'c',
        clubSlug: 'club',
        clubName: 'Club',
        membershipId: 'm',
        status,
        roles,
        currency: 'EUR',
        locale: 'en',
        timeZone: 'UTC',
        units: 'metric',
      },
    ],
    demo: false,
    firstRun: false,
  });
  session.enterClub('club');
  const router = createRouter({ history: createMemoryHistory(), routes });
  let navigation: ReturnType<typeof useNavigation> | undefined;
  mount(
    defineComponent(() => {
      navigation = useNavigation();
      return () => null;
    }),
    { global: { plugins: [router] } },
  );
  return navigation?.items.value.map(({ label, under }) => ({
    label,
    under: under.map((child) => child.label),
  }));
}

beforeEach(() => setActivePinia(createPinia()));

describe('useNavigation', () => {
  it('shows a member the club and hides what only a role may see', () => {
    const [, , , club] = placesOf('active') ?? [];
    expect(club?.label).toBe('Club');
    expect(club?.under).toContain('Members');
    expect(club?.under).not.toContain('Audit log');
  });

  it('shows a steward the audit log', () => {
    const places = placesOf('active', { organiser: false, treasurer: false, steward: true });
    expect(places?.[3]?.under).toContain('Audit log');
  });

  it.each(['left', 'removed'] as const)('leaves those who %s only what stays theirs', (status) => {
    expect(placesOf(status)?.map(({ label }) => label)).toEqual(['Buys', 'Ledger', 'Notices']);
  });
});
