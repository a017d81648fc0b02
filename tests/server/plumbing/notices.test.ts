import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { select, transact } from '#server/config/database.ts';
import { unsubscribePath } from '#server/mail/unsubscribeToken.ts';
import { queueNotice } from '#server/services/notices/queueNotice.ts';
import { browser } from '#tests/support/client.ts';
import { makeWorld } from '#tests/support/world.ts';

const content = { subject: 'A word', paragraphs: ['One.', 'Two.'] };

describe('notices', () => {
  it('lists own notices alone, newest first, and marks them read', async () => {
    const { club, people } = await makeWorld();
    for (const [index, person] of [people.member, people.helper, people.member].entries()) {
      await transact((tx) =>
        queueNotice(tx, {
          clubId: club.id,
          kind: 'arrived',
          eventKey: `n${index}:${club.id}`,
          to: [person.membership.id],
          content: { ...content, subject: `Notice ${index}` },
        }),
      );
    }
    const agent = await people.member.agent();
    const { body } = await agent.get(`/api/v1/clubs/${club.slug}/notices`).expect(200);
    expect(body.unread).toBe(2);
    expect(body.notices.map((notice: { subject: string }) => notice.subject)).toEqual([
      'Notice 2',
      'Notice 0',
    ]);
    const after = await agent.post(`/api/v1/clubs/${club.slug}/notices/read`).expect(200);
    expect(after.body.unread).toBe(0);
  });

  it('turns kinds off, but never what concerns money or pickup', async () => {
    const { club, people } = await makeWorld();
    const agent = await people.member.agent();
    const url = `/api/v1/clubs/${club.slug}/notices/preferences`;
    await agent
      .put(url)
      .send({ off: ['arrived', 'buy_opened'] })
      .expect(200, { off: ['arrived', 'buy_opened'] });
    const refused = await agent
      .put(url)
      .send({ off: ['locked'] })
      .expect(422);
    expect(refused.body.errors).toHaveProperty(['off.0']);
    await agent.get(url).expect(200, { off: ['arrived', 'buy_opened'] });
  });

  it('unsubscribes by link: reading changes nothing, posting does, from anywhere, once and for all', async () => {
    const { club, people } = await makeWorld();
    const path = `/api/v1${unsubscribePath(people.member.membership.id, 'arrived')}`;
    const shown = await browser().get(path).expect(200);
    expect(shown.body).toEqual({ clubName: club.name, kind: 'arrived', off: false });
    for (let time = 0; time < 2; time += 1) {
      const posted = await browser()
        .post(path)
        .set('Sec-Fetch-Site', 'cross-site')
        .type('form')
        .send('List-Unsubscribe=One-Click')
        .expect(200);
      expect(posted.body.off).toBe(true);
    }
    const [row] = await select<{ notice_off: string[] }>(
      'select notice_off from memberships where id = :id',
      {
        id: people.member.membership.id,
      },
    );
    expect(row?.notice_off).toEqual(['arrived']);
    await browser().post(`${path}x`).expect(404);
    await browser()
      .get(`/api/v1${unsubscribePath(people.member.membership.id, 'locked')}`)
      .expect(404);
  });

  it('sends in the organiser’s words, once, to those chosen, with the calendar on split day', async () => {
    const { club, people, buy } = await makeWorld();
    const agent = await people.own.agent();
    const url = `/api/v1/clubs/${club.slug}/buys/${buy.id}/notices`;
    const draft = await agent.get(`${url}/draft`).expect(200);
    expect(draft.body.templates.map((template: { kind: string }) => template.kind)).toEqual([
      'message',
      'split_day',
    ]);
    const notice = {
      id: randomUUID(),
      kind: 'split_day',
      subject: 'Bring gloves',
      body: 'First.\n\nSecond.',
      to: [people.member.membership.id, people.helper.membership.id],
    };
    await agent.post(url).send(notice).expect(200, { sent: 2 });
    await agent.post(url).send(notice).expect(200);
    const mails = await select<{ attachments: { text: string }[] }>(
      'select attachments from outbox where buy_id = :buyId',
      { buyId: buy.id },
    );
    expect(mails).toHaveLength(2);
    expect(mails[0]?.attachments[0]?.text).toContain('BEGIN:VEVENT');
    const { body } = await agent.get(url).expect(200);
    expect(body.deliveries).toHaveLength(2);
    expect(body.deliveries[0]).toMatchObject({ kind: 'split_day', state: 'queued' });
    await agent
      .post(url)
      .send({ ...notice, id: randomUUID(), to: [people.stranger.membership.id] })
      .expect(422);
  });
});
