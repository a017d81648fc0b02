import { randomBytes } from 'node:crypto';
import { execute, transact } from '#server/config/database.ts';
import { Account } from '#server/models/Account.ts';
import { Buy } from '#server/models/Buy.ts';
import { Club } from '#server/models/Club.ts';
import { Line } from '#server/models/Line.ts';
import { Membership } from '#server/models/Membership.ts';
import { hashPassword } from '#server/services/accounts/passwords.ts';
import { signedIn, testPassword, type Agent } from './client.ts';

let passwordHash: Promise<string> | undefined;

/** An account with testPassword; the address is made up when absent. */
export async function makeAccount(displayName: string, email?: string): Promise<Account> {
  passwordHash ??= hashPassword(testPassword);
  return Account.create({
    displayName,
    email: email ?? `${randomBytes(5).toString('hex')}@quillmere.example`,
    passwordHash: await passwordHash,
  });
}

/** A club, without members. */
export async function makeClub(
  fields: Partial<{ name: string; currency: string; slug: string }> = {},
): Promise<Club> {
  return Club.create({
    slug: fields.slug ?? `club-${randomBytes(4).toString('hex')}`,
    name: fields.name ?? 'Test club',
    currency: fields.currency ?? 'EUR',
    timeZone: 'Europe/Berlin',
  });
}

export type RoleName = 'organiser' | 'treasurer' | 'steward';

export interface Person {
  readonly account: Account;
  readonly membership: Membership;
  readonly email: string;
  agent(): Promise<Agent>;
}

/** A member of a club, with roles, and a browser when asked for. */
export async function makeMember(
  club: Club,
  displayName: string,
  roles: readonly RoleName[] = [],
  status: 'active' | 'pending' | 'left' | 'removed' = 'active',
): Promise<Person> {
  const account = await makeAccount(displayName);
  const membership = await Membership.create({
    clubId: club.id,
    accountId: account.id,
    displayName,
    status,
    isOrganiser: roles.includes('organiser'),
    isTreasurer: roles.includes('treasurer'),
    isSteward: roles.includes('steward'),
  });
  let agent: Promise<Agent> | undefined;
  return {
    account,
    membership,
    email: account.email,
    agent: () => (agent ??= signedIn(account.email)),
  };
}

/** A guest: a membership without sign-in. */
export async function makeGuest(
  club: Club,
  displayName: string,
  vouchedBy: Person,
): Promise<Membership> {
  return Membership.create({
    clubId: club.id,
    displayName,
    isGuest: true,
    guestContact: 'met at the fair',
    vouchedById: vouchedBy.membership.id,
  });
}

export interface World {
  readonly club: Club;
  readonly people: Record<
    'member' | 'organiser' | 'own' | 'treasurer' | 'steward' | 'helper' | 'cashHelper' | 'stranger',
    Person
  >;
  readonly buy: Buy;
  readonly line: Line;
}

/**
 * One club with a person in each part and one buy (potassium nitrate, one line) organised by `own`; `stranger` is
 * organiser, treasurer and steward of another club. Helpers act while the buy is arrived, splitting or in pickup.
 */
export async function makeWorld(state: Buy['state'] = 'open'): Promise<World> {
  const club = await makeClub();
  const other = await makeClub({ name: 'Other club' });
  const people = {
    member: await makeMember(club, 'Member Mo'),
    organiser: await makeMember(club, 'Organiser Ola', ['organiser']),
    own: await makeMember(club, 'Own Organiser', ['organiser']),
    treasurer: await makeMember(club, 'Treasurer Tam', ['treasurer']),
    steward: await makeMember(club, 'Steward Stig', ['steward']),
    helper: await makeMember(club, 'Helper Hal'),
    cashHelper: await makeMember(club, 'Helper Cas'),
    stranger: await makeMember(other, 'Stranger', ['organiser', 'treasurer', 'steward']),
  };
  const day = 86_400_000;
  const buy = await Buy.create({
    clubId: club.id,
    name: 'Test buy',
    state,
    responsibleId: people.own.membership.id,
    closesAt: new Date(Date.now() + 3 * day),
    splitsAt: new Date(Date.now() + 10 * day),
    openedAt: state === 'draft' ? null : new Date(),
  });
  const line = await Line.create({ buyId: buy.id, saltId: 'KNO3', position: 0 });
  await transact(async (tx) => {
    for (const [person, cash] of [
      [people.helper, false],
      [people.cashHelper, true],
    ] as const) {
      await execute(
        'insert into buy_helpers (buy_id, membership_id, takes_cash) values (:buyId, :membershipId, :cash)',
        { buyId: buy.id, membershipId: person.membership.id, cash },
        tx,
      );
    }
  });
  return { club, people, buy, line };
}
