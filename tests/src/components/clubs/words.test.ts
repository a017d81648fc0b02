import { describe, expect, it } from 'vitest';
import type { ClubReply } from '#shared/schemas/clubs.ts';
import type { Member } from '#shared/schemas/members.ts';
import { currencyCodes } from '#shared/domain/money/currencies.ts';
import { pickDemoPeople } from 'src/components/accounts/demoRoles.ts';
import { listChanges, namesSubject, sayAct } from 'src/components/clubs/auditWords.ts';
import {
  currencyChoices,
  deviceDefaults,
  localeChoices,
  timeZoneChoices,
} from 'src/components/clubs/clubChoices.ts';
import { changesOf, toDraft } from 'src/components/clubs/clubDraft.ts';
import { filterMembers, sayRoles } from 'src/components/clubs/memberRows.ts';

const format = {
  money: (minor: number) => `€${minor / 100}`,
  mass: (mg: number) => `${mg / 1000} g`,
  percent: (permille: number) => `${permille / 10} %`,
  dateTime: () => 'Tue 1 Dec, 19:09',
};

describe('an audit entry in words', () => {
  it('says what was done, spelling out what it has no words for', () => {
    expect(sayAct('clubs.roles')).toBe('changed the roles of');
    expect(sayAct('supplierOrders.markPlaced')).toBe('supplier orders: mark placed');
    expect(namesSubject('clubs.join')).toBe(false);
    expect(namesSubject('clubs.remove')).toBe(true);
  });

  it('reads units from keys, leaves ids and what stayed out', () => {
    const changes = listChanges(
      {
        wantedMg: 400_000,
        name: 'Same',
        vouchedById: 'x',
        roles: { organiser: true, steward: true },
      },
      {
        wantedMg: 0,
        name: 'Same',
        amountMinor: 1496,
        closesAt: '2026-12-01T18:09:00.000Z',
        note: '',
        flags: [true, 'a'],
        roles: { organiser: false, steward: false },
      },
      format,
    );
    expect(changes.map(({ label, before, after }) => [label, before, after])).toEqual([
      ['Wanted', '400 g', '0 g'],
      ['Roles', 'organiser, steward', 'none'],
      ['Amount', '', '€14.96'],
      ['Closes at', '', 'Tue 1 Dec, 19:09'],
      ['What the club is', '', '–'],
      ['Flags', '', 'yes, a'],
    ]);
  });
});

describe('what a new club may choose', () => {
  it('lists every currency and what a club has already', () => {
    expect(currencyChoices('en')).toHaveLength(currencyCodes.length);
    expect(currencyChoices('en').find(({ value }) => value === 'EUR')?.label).toBe('EUR · Euro');
    expect(localeChoices('en', 'fy-NL').some(({ value }) => value === 'fy-NL')).toBe(true);
    expect(timeZoneChoices('Europe/Berlin')).toContainEqual({
      value: 'Europe/Berlin',
      label: 'Europe/Berlin',
    });
  });

  it('starts with something that the server takes', () => {
    const defaults = deviceDefaults();
    expect(currencyCodes).toContain(defaults.currency);
    expect(Intl.DateTimeFormat.supportedLocalesOf(defaults.locale)).toHaveLength(1);
  });
});

describe('the settings that are sent', () => {
  const club = { name: 'Old', note: '', precursorMonths: 18, shelfLimitMinor: 5 } as ClubReply;

  it('are those that differ', () => {
    const draft = toDraft(club);
    expect(changesOf(draft, club)).toEqual({});
    draft.name = 'New';
    draft.precursorMonths = 24;
    expect(changesOf(draft, club)).toEqual({ name: 'New', precursorMonths: 24 });
  });
});

describe('the members that are shown', () => {
  const member = (over: Partial<Member>) =>
    ({
      status: 'active',
      isGuest: false,
      roles: { organiser: false, treasurer: false, steward: false },
      ...over,
    }) as Member;
  const people = [
    member({ id: 'plain' }),
    member({ id: 'both', roles: { organiser: true, treasurer: false, steward: true } }),
    member({ id: 'guest', isGuest: true }),
    member({ id: 'asks', status: 'pending' }),
    member({ id: 'gone', status: 'removed' }),
    member({ id: 'left', status: 'left' }),
  ];
  const ids = (filter: Parameters<typeof filterMembers>[1]) =>
    filterMembers(people, filter).map(({ id }) => id);

  it('are narrowed by role, guests and former ones', () => {
    expect(ids('all')).toEqual(['plain', 'both', 'guest']);
    expect(ids('organiser')).toEqual(['both']);
    expect(ids('treasurer')).toEqual([]);
    expect(ids('guests')).toEqual(['guest']);
    expect(ids('former')).toEqual(['gone', 'left']);
    expect(people.map(sayRoles)).toEqual([
      'member',
      'organiser, steward',
      'guest',
      'member',
      'removed',
      'left',
    ]);
  });
});

describe('the demo people of the sign-in page', () => {
  it('are one for each role, those with least beside it', () => {
    const person = (name: string, roles: ('organiser' | 'treasurer' | 'steward')[]) => ({
      name,
      email: `${name}@quillmere.example`,
      clubName: 'Quillmere',
      roles,
    });
    const people = [
      person('mo', []),
      person('tam', ['treasurer']),
      person('imke', ['organiser', 'treasurer', 'steward']),
    ];
    expect(pickDemoPeople(people).map(({ role, person: { name } }) => [role, name])).toEqual([
      ['member', 'mo'],
      ['organiser', 'imke'],
      ['treasurer', 'tam'],
      ['steward', 'imke'],
    ]);
    expect(pickDemoPeople([])).toEqual([]);
  });
});
