import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { eraseExpired } from '#server/services/accounts/eraseExpired.ts';
import { postTransaction } from '#server/services/ledger/postTransaction.ts';
import { browser, signedIn } from '#tests/support/client.ts';
import { makeAccount, makeClub, makeMember } from '#tests/support/world.ts';

const wanted = {
  name: 'Quillmere Water Gardeners',
  slug: 'quillmere',
  displayName: 'Imke',
  currency: 'EUR',
  locale: 'nl-NL',
  timeZone: 'Europe/Amsterdam',
  units: 'metric',
};

describe('founding a club', () => {
  it('gives the founder all three roles, and the address to one club', async () => {
    const agent = await signedIn((await makeAccount('Imke')).email);
    await agent.post('/api/v1/clubs').send(wanted).expect(201, { slug: 'quillmere' });
    const { body } = await agent.get('/api/v1/session');
    expect(body.memberships[0].roles).toEqual({ organiser: true, treasurer: true, steward: true });
    const taken = await agent.post('/api/v1/clubs').send(wanted).expect(422);
    expect(Object.keys(taken.body.errors)).toEqual(['slug']);
    await agent.get('/api/v1/clubs/quillmere/first-steps').expect(200, {
      members: 1,
      invited: 0,
      suppliers: 0,
      offers: 0,
      buys: 0,
      hasContact: false,
      hasTransfer: false,
    });
  });

  it.each([
    ['name', ' '],
    ['slug', 'Quill mere'],
    ['slug', 'a--b'],
    ['currency', 'EURO'],
    ['currency', 'XAU'],
    ['locale', 'not a locale'],
    ['timeZone', 'Europe/Quillmere'],
    ['units', 'imperial'],
    ['displayName', ''],
  ])('refuses %s %j beside its field', async (field, value) => {
    const agent = await signedIn((await makeAccount('Ravi')).email);
    const { body } = await agent
      .post('/api/v1/clubs')
      .send({ ...wanted, slug: 'another', [field]: value })
      .expect(422);
    expect(Object.keys(body.errors)).toEqual([field]);
  });
});

describe('settings', () => {
  it('changes what was sent over the version that was seen, and writes it down', async () => {
    const club = await makeClub({ name: 'Old name' });
    const agent = await (await makeMember(club, 'Stig', ['steward'])).agent();
    const url = `/api/v1/clubs/${club.slug}`;
    const { body } = await agent
      .patch(url)
      .send({ version: 1, name: 'New name', placeNote: 'Back door' })
      .expect(200);
    expect(body).toMatchObject({
      name: 'New name',
      placeNote: 'Back door',
      version: 2,
      currencyFixed: false,
    });
    const stale = await agent.patch(url).send({ version: 1, name: 'Other name' }).expect(409);
    expect(stale.body).toMatchObject({ code: 'stale', current: { version: 2 } });
    expect((await agent.patch(url).send({ version: 2, name: 'New name' })).body.version).toBe(2);
    const rows = await select<{ before: unknown; after: unknown }>(
      `select before, after from audit_entries where club_id = :id`,
      { id: club.id },
    );
    expect(rows).toEqual([
      {
        before: { name: 'Old name', placeNote: '' },
        after: { name: 'New name', placeNote: 'Back door' },
      },
    ]);
  });

  it('refuses what is no setting, and wrong values beside their field', async () => {
    const club = await makeClub();
    const agent = await (await makeMember(club, 'Stig', ['steward'])).agent();
    const url = `/api/v1/clubs/${club.slug}`;
    await agent.patch(url).send({ version: 1, slug: 'other' }).expect(422);
    await agent.patch(url).send({ version: 1, shelfLimitMinor: 5 }).expect(422);
    const { body } = await agent
      .patch(url)
      .send({ version: 1, precursorMonths: 0, note: 'x'.repeat(2001) })
      .expect(422);
    expect(Object.keys(body.errors).sort()).toEqual(['note', 'precursorMonths']);
  });

  it('fixes the currency once the books have an entry', async () => {
    const club = await makeClub();
    const agent = await (await makeMember(club, 'Stig', ['steward'])).agent();
    const url = `/api/v1/clubs/${club.slug}`;
    await agent.patch(url).send({ version: 1, currency: 'CHF' }).expect(200);
    await transact((tx) =>
      postTransaction(tx, {
        clubId: club.id,
        eventType: 'test',
        eventId: 'one',
        onDate: '2026-12-01',
        memo: '',
        by: { membershipId: null, name: 'test' },
        postings: [
          { account: { kind: 'bank' }, amountMinor: 1 },
          { account: { kind: 'cash' }, amountMinor: -1 },
        ],
      }),
    );
    const { body } = await agent.patch(url).send({ version: 2, currency: 'EUR' }).expect(422);
    expect(Object.keys(body.errors)).toEqual(['currency']);
    expect((await agent.get(url)).body).toMatchObject({ currency: 'CHF', currencyFixed: true });
  });

  it("leaves the shelf's limit to the treasurer", async () => {
    const club = await makeClub();
    const agent = await (await makeMember(club, 'Tam', ['treasurer'])).agent();
    const url = `/api/v1/clubs/${club.slug}/shelf-limit`;
    const { body } = await agent.put(url).send({ version: 1, shelfLimitMinor: 2500 }).expect(200);
    expect(body).toMatchObject({
      shelfLimitMinor: 2500,
      may: { edit: false, setShelfLimit: true },
    });
    await agent.put(url).send({ version: 1, shelfLimitMinor: 0 }).expect(409);
    await agent.put(url).send({ version: 2, shelfLimitMinor: -1 }).expect(422);
  });

  it('shows strangers name, note and contact, and nothing else', async () => {
    const club = await makeClub({ name: 'Quillmere' });
    await club.update({
      note: 'We grow.',
      contact: 'post@quillmere.example',
      placeAddress: 'Secret',
    });
    await browser().get(`/api/v1/public/${club.slug}`).expect(200, {
      slug: club.slug,
      name: 'Quillmere',
      note: 'We grow.',
      contact: 'post@quillmere.example',
    });
    await browser().get('/api/v1/public/no-such-club').expect(404);
  });
});

describe('what has run out', () => {
  it('is erased: limits, tokens, and old invitations that nobody took', async () => {
    const club = await makeClub();
    const steward = await makeMember(club, 'Stig', ['steward']);
    await transact(async (tx) => {
      await execute(
        `insert into rate_limits values ('old', 3, now() - interval '1 minute'), ('new', 3, now() + interval '1 minute')`,
        {},
        tx,
      );
      await execute(
        `insert into account_tokens (account_id, kind, token_hash, expires_at) values
           (:id, 'reset', 'old', now() - interval '2 days'), (:id, 'reset', 'new', now() + interval '1 hour')`,
        { id: steward.account.id },
        tx,
      );
      await execute(
        `insert into invitations (club_id, kind, token_hash, email, created_by_id, expires_at) values
           (:club, 'email', 'old', 'a@quillmere.example', :by, now() - interval '91 days'),
           (:club, 'email', 'new', 'b@quillmere.example', :by, now() - interval '1 day')`,
        { club: club.id, by: steward.membership.id },
        tx,
      );
    });
    await eraseExpired();
    const rows = await select<{ key: string }>(
      `select key from rate_limits where key in ('old', 'new')
       union all select token_hash from account_tokens where token_hash in ('old', 'new')
       union all select token_hash from invitations where token_hash in ('old', 'new')`,
    );
    expect(rows.map(({ key }) => key)).toEqual(['new', 'new', 'new']);
  });
});
