import { createPinia, setActivePinia } from 'pinia';
import { beforeEach, describe, expect, it } from 'vitest';
import type { SessionReply } from '#shared/schemas/session.ts';
import { useSessionStore } from 'src/stores/session.ts';

type Membership = SessionReply['memberships'][number];

const membership = (clubSlug: string, status: Membership['status'] = 'active'): Membership => ({
  clubId: `club-${clubSlug}`,
  clubSlug,
  clubName: clubSlug,
  membershipId: `member-${clubSlug}`,
  status,
  roles: { organiser: true, treasurer: false, steward: false },
  currency: 'EUR',
  locale: 'en',
  timeZone: 'UTC',
  units: 'metric',
});

const reply = (...memberships: Membership[]): SessionReply => ({
  account: { id: 'a', email: 'noor@example.org', displayName: 'Noor Valdane' },
  memberships,
  demo: false,
  firstRun: false,
});

beforeEach(() => {
  localStorage.clear();
  setActivePinia(createPinia());
});

describe('useSessionStore', () => {
  it('comes home to the club of last time, or the first that is open', () => {
    const session = useSessionStore();
    session.receive(reply(membership('moss', 'pending'), membership('fen'), membership('reed')));
    expect(session.homeClub?.clubSlug).toBe('fen');
    session.enterClub('reed');
    setActivePinia(createPinia());
    const later = useSessionStore();
    later.receive(reply(membership('fen'), membership('reed')));
    expect(later.homeClub?.clubSlug).toBe('reed');
  });

  it('opens no club that has not let the account in', () => {
    const session = useSessionStore();
    session.receive(reply(membership('moss', 'pending')));
    session.enterClub('moss');
    expect(session.currentClub).toBeNull();
    expect(session.homeClub).toBeNull();
  });

  it('knows the roles in the club at hand and none once signed out', () => {
    const session = useSessionStore();
    session.receive(reply(membership('fen')));
    session.enterClub('fen');
    expect(session.hasRole('organiser')).toBe(true);
    expect(session.hasRole('steward')).toBe(false);
    session.clear();
    expect(session.signedIn).toBe(false);
    expect(session.hasRole('organiser')).toBe(false);
  });
});
