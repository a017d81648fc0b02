import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { closeMail, openMail, smtpFake } from '#server/mail/transport.ts';
import { readUnsubscribeToken } from '#server/mail/unsubscribeToken.ts';
import { queueMail, queueNotice } from '#server/services/notices/queueNotice.ts';
import { backOffSeconds, sendOutbox } from '#server/services/notices/sendOutbox.ts';
import { makeClub, makeGuest, makeMember } from '#tests/support/world.ts';

const content = {
  subject: 'Closing <soon> & quickly',
  paragraphs: ['The buy closes tomorrow at 20:00.', 'Prices are in €.'],
  rows: [['You would pay', '14.96 EUR']] as const,
  action: { label: 'Open the sheet', path: '/c/quillmere/buys/1' },
};

const dataFolder = mkdtempSync(path.join(tmpdir(), 'tarewell-mail-'));

beforeAll(async () => {
  process.env.TAREWELL_DATA = dataFolder;
  await openMail();
});
afterAll(closeMail);
beforeEach(async () => {
  await transact((tx) => execute('delete from outbox', {}, tx));
});

async function received() {
  return (await smtpFake()?.list()) ?? [];
}

describe('outbox', () => {
  it('lists a notice for each member and mails each address once, over SMTP', async () => {
    const club = await makeClub({ name: 'Quillmere' });
    const noor = await makeMember(club, 'Noor');
    const pim = await makeMember(club, 'Pim');
    const guest = await makeGuest(club, 'Guest', noor);
    const notice = {
      clubId: club.id,
      kind: 'closing_soon' as const,
      eventKey: 'test:closing',
      to: [noor.membership.id, pim.membership.id, guest.id],
      content,
      attachments: [{ fileName: 'day.ics', contentType: 'text/calendar', text: 'BEGIN:VCALENDAR' }],
    };
    await transact((tx) => queueNotice(tx, notice));
    await transact((tx) => queueNotice(tx, notice));
    expect(await sendOutbox()).toBe(2);
    const mails = await received();
    expect(mails.map(({ to }) => to[0]).sort()).toEqual([noor.email, pim.email].sort());
    const mail = mails.find(({ to }) => to[0] === noor.email);
    expect(mail?.subject).toBe(content.subject);
    expect(mail?.text).toContain('You would pay: 14.96 EUR');
    expect(mail?.html).toContain('Closing &lt;soon&gt; &amp; quickly');
    expect(mail?.attachments[0]).toMatchObject({ fileName: 'day.ics', text: 'BEGIN:VCALENDAR' });
    const rows = await select<{ n: number }>(
      `select count(*)::int as n from notices where event_key = 'test:closing'`,
    );
    expect(rows[0]?.n).toBe(3);
    const token = /unsubscribe\/(\S+)/.exec(mail?.text ?? '')?.[1] ?? '';
    expect(readUnsubscribeToken(token)).toEqual({
      membershipId: noor.membership.id,
      kind: 'closing_soon',
    });
    expect(readUnsubscribeToken(`${token.slice(0, -2)}xx`)).toBeNull();
  });

  it('keeps what concerns money on, whatever a member turned off', async () => {
    const club = await makeClub();
    const ravi = await makeMember(club, 'Ravi');
    await ravi.membership.update({ noticeOff: ['closing_soon', 'locked'] });
    for (const kind of ['closing_soon', 'locked'] as const) {
      await transact((tx) =>
        queueNotice(tx, {
          clubId: club.id,
          kind,
          eventKey: `off:${kind}`,
          to: [ravi.membership.id],
          content,
        }),
      );
    }
    const rows = await select<{ kind: string }>(
      'select kind from outbox where address = :address',
      {
        address: ravi.email,
      },
    );
    expect(rows).toEqual([{ kind: 'locked' }]);
  });

  it('sends nothing of a transaction that fails', async () => {
    const club = await makeClub();
    const orla = await makeMember(club, 'Orla');
    await expect(
      transact(async (tx) => {
        await queueNotice(tx, {
          clubId: club.id,
          kind: 'locked',
          eventKey: 'gone',
          to: [orla.membership.id],
          content,
        });
        throw new Error('undone');
      }),
    ).rejects.toThrow('undone');
    expect(await sendOutbox()).toBe(0);
  });

  it('tries later when refused for now, and stops when refused for good', async () => {
    const mail = { kind: 'invitation' as const, greeting: 'you', from: 'Quillmere', content };
    await transact(async (tx) => {
      await queueMail(tx, { ...mail, eventKey: 'a', address: 'busy@later.example' });
      await queueMail(tx, { ...mail, eventKey: 'b', address: 'gone@refused.example' });
    });
    expect(await sendOutbox()).toBe(2);
    const rows = await select<{ address: string; state: string; attempts: number; waits: boolean }>(
      `select address, state, attempts, next_attempt_at > now() as waits from outbox order by address`,
    );
    expect(rows).toEqual([
      { address: 'busy@later.example', state: 'queued', attempts: 1, waits: true },
      { address: 'gone@refused.example', state: 'failed', attempts: 1, waits: true },
    ]);
    expect(await sendOutbox()).toBe(0);
    expect([1, 2, 3, 9, 20].map(backOffSeconds)).toEqual([10, 20, 40, 2560, 3600]);
  });

  it('lets two senders share the work without sending twice', async () => {
    await transact(async (tx) => {
      for (let n = 0; n < 12; n += 1) {
        await queueMail(tx, {
          kind: 'invitation',
          greeting: 'you',
          from: 'Quillmere',
          content,
          eventKey: 'many',
          address: `m${n}@quillmere.example`,
        });
      }
    });
    const tried = await Promise.all([sendOutbox(), sendOutbox(), sendOutbox()]);
    expect(tried.reduce((sum, n) => sum + n)).toBe(12);
    const many = (await received()).filter(({ to }) => /^m\d+@/.test(to[0] ?? ''));
    expect(new Set(many.map(({ messageId }) => messageId)).size).toBe(12);
    expect(many).toHaveLength(12);
  });
});
