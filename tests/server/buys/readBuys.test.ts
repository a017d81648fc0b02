import { describe, expect, it } from 'vitest';
import { BuyHeader, BuyList } from '#shared/schemas/buys.ts';
import { Membership } from '#server/models/Membership.ts';
import { Pledge } from '#server/models/Pledge.ts';
import { makeWorld, type Person } from '#tests/support/world.ts';

describe('the list and the head of buys', () => {
  it('shows a draft to its organiser alone', async () => {
    const { club, people, buy } = await makeWorld('draft');
    const own = await people.own.agent();
    const list = BuyList.parse((await own.get(`/api/v1/clubs/${club.slug}/buys`)).body);
    expect(list.buys.map(({ id }) => id)).toEqual([buy.id]);
    expect(list.mayDraft).toBe(true);
    const member = await people.member.agent();
    const theirs = BuyList.parse((await member.get(`/api/v1/clubs/${club.slug}/buys`)).body);
    expect(theirs).toEqual({ buys: [], mayDraft: false });
    await member.get(`/api/v1/clubs/${club.slug}/buys/${buy.id}`).expect(404);
  });

  it('shows those who left the buys they are part of, and no others', async () => {
    const { club, people, buy, line } = await makeWorld('open');
    const url = `/api/v1/clubs/${club.slug}/buys`;
    for (const person of [people.own, people.treasurer]) {
      await Membership.update({ status: 'left' }, { where: { id: person.membership.id } });
    }
    await Pledge.create({
      buyId: buy.id,
      lineId: line.id,
      membershipId: people.treasurer.membership.id,
      wantedMg: 500_000,
      at: new Date(),
    });
    const list = async (person: Person) =>
      BuyList.parse((await (await person.agent()).get(url).expect(200)).body);
    expect((await list(people.treasurer)).buys.map(({ id }) => id)).toEqual([buy.id]);
    expect(await list(people.own)).toEqual({ buys: [], mayDraft: false });
  });

  it('says what the reader may do and what is next for them', async () => {
    const { club, people, buy } = await makeWorld('open');
    const url = `/api/v1/clubs/${club.slug}/buys/${buy.id}`;
    const own = BuyHeader.parse((await (await people.own.agent()).get(url).expect(200)).body);
    expect(own.may).toMatchObject({ edit: true, open: false, cancel: true });
    expect(own.next).toMatchObject({ code: 'pledge', who: 'members' });
    expect(own.helpers).toHaveLength(2);
    const member = BuyHeader.parse((await (await people.member.agent()).get(url).expect(200)).body);
    expect(member.may).toMatchObject({ edit: false, cancel: false, copy: false });
    expect(member.next).toMatchObject({ code: 'pledge', who: 'you' });
  });
});
