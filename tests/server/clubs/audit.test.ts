import { describe, expect, it } from 'vitest';
import { transact } from '#server/config/database.ts';
import { writeAudit } from '#server/services/audit/writeAudit.ts';
import type { AuditEntry } from '#shared/schemas/audit.ts';
import { makeClub, makeMember, makeWorld } from '#tests/support/world.ts';

describe('the audit log', () => {
  it('is read newest first, page by page, and narrowed', async () => {
    const { club, people, buy } = await makeWorld();
    const by = { membershipId: people.own.membership.id, name: 'Own Organiser' };
    await transact(async (tx) => {
      for (let number = 1; number <= 60; number += 1) {
        await writeAudit(tx, {
          clubId: club.id,
          ...(number % 2 === 0 ? { buyId: buy.id } : {}),
          by: number === 60 ? { membershipId: null, name: 'closing' } : by,
          action: number % 3 === 0 ? 'test.third' : 'test.other',
          subject: { type: 'membership', id: people.member.membership.id },
          after: { number },
        });
      }
    });
    const agent = await people.steward.agent();
    const read = async (query: Record<string, string> = {}) =>
      (await agent.get(`/api/v1/clubs/${club.slug}/audit`).query(query).expect(200)).body as {
        entries: AuditEntry[];
        next: number | null;
      };
    const numbers = (page: { entries: AuditEntry[] }) =>
      page.entries.map(({ after }) => after?.number);
    const first = await read();
    expect(numbers(first)).toEqual(Array.from({ length: 50 }, (_, index) => 60 - index));
    const second = await read({ before: String(first.next) });
    expect(numbers(second)).toEqual([10, 9, 8, 7, 6, 5, 4, 3, 2, 1]);
    expect(second.next).toBeNull();
    expect(numbers(await read({ action: 'test.third', buy: buy.id }))).toEqual([
      60, 54, 48, 42, 36, 30, 24, 18, 12, 6,
    ]);
    expect(numbers(await read({ person: 'jobs' }))).toEqual([60]);
    expect(numbers(await read({ person: people.own.membership.id }))).toHaveLength(50);
    expect(numbers(await read({ person: people.member.membership.id }))).toHaveLength(50);
    expect(numbers(await read({ person: people.treasurer.membership.id }))).toEqual([]);
    expect(first.entries[0]).toMatchObject({
      actorName: 'closing',
      subjectName: 'Member Mo',
      buy: { id: buy.id, name: 'Test buy' },
    });
    const { body } = await agent.get(`/api/v1/clubs/${club.slug}/audit/choices`).expect(200);
    expect(body).toEqual({
      actions: ['test.other', 'test.third'],
      people: [
        { id: people.own.membership.id, name: 'Own Organiser' },
        { id: 'jobs', name: 'Tarewell itself' },
      ],
      buys: [{ id: buy.id, name: 'Test buy' }],
    });
    await agent.get(`/api/v1/clubs/${club.slug}/audit`).query({ person: 'nobody' }).expect(422);
  });

  it("leaves members' money out for a steward who may not see it", async () => {
    const club = await makeClub();
    const steward = await makeMember(club, 'Steward', ['steward']);
    const both = await makeMember(club, 'Both', ['steward', 'treasurer']);
    await transact((tx) =>
      writeAudit(tx, {
        clubId: club.id,
        by: { membershipId: null, name: 'test' },
        action: 'test.paid',
        subject: { type: 'membership', id: both.membership.id },
        after: { method: 'cash', private: { amountMinor: 1496 } },
      }),
    );
    const seenBy = async (person: typeof steward) =>
      (await (await person.agent()).get(`/api/v1/clubs/${club.slug}/audit`)).body.entries[0];
    expect(await seenBy(steward)).toMatchObject({ after: { method: 'cash' }, moneyHidden: true });
    expect(JSON.stringify(await seenBy(steward))).not.toContain('1496');
    expect(await seenBy(both)).toMatchObject({
      after: { method: 'cash', amountMinor: 1496 },
      moneyHidden: false,
    });
  });
});
