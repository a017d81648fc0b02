import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { effectScope, reactive, ref } from 'vue';
import type { BuyHeader } from '#shared/schemas/buys.ts';
import type { PickupPerson } from '#shared/schemas/pickup.ts';
import { useHandover } from 'src/components/pickup/useHandover.ts';
import { usePickupStore } from 'src/stores/pickup.ts';
import { deskOf, personOf, portionOf } from './desk.ts';

const second = portionOf({
  id: '00000000-0000-4000-8000-000000000002',
  saltId: 'K2SO4',
  salt: 'Potassium sulfate',
  code: '0031',
});
const sent: { url: string; method: string; body: unknown }[] = [];
let reply: { status: number; body: unknown };
let stop = () => {};

beforeEach(() => {
  setActivePinia(createPinia());
  sent.length = 0;
  reply = { status: 200, body: deskOf() };
  vi.stubGlobal('fetch', (url: string | URL, init: RequestInit = {}) => {
    sent.push({
      url: String(url),
      method: init.method ?? 'GET',
      body: typeof init.body === 'string' ? JSON.parse(init.body) : null,
    });
    return Promise.resolve(
      new Response(JSON.stringify(reply.body), {
        status: reply.status,
        headers: {
          'Content-Type': reply.status < 400 ? 'application/json' : 'application/problem+json',
        },
      }),
    );
  });
});
afterEach(() => {
  stop();
  vi.unstubAllGlobals();
});

function start(person: PickupPerson, pass: string | null = null) {
  const scope = effectScope();
  stop = () => scope.stop();
  const open = ref(true);
  // Only its id is looked at.
  const head = { id: deskOf().buyId } as BuyHeader;
  const props = reactive({ club: 'quillmere', head, person, pass });
  const handover = scope.run(() => useHandover(open, props));
  if (!handover) throw new Error('no scope');
  return { open, handover };
}

describe('a hand-over', () => {
  it('begins with all that waits, and says what is still missing', () => {
    const { handover } = start(
      personOf({
        portions: [portionOf(), second],
        paid: false,
        reportable: ['Potassium nitrate'],
        papersMissing: [{ saltId: 'KNO3', salt: 'Potassium nitrate' }],
      }),
    );
    expect(handover.chosen.value).toHaveLength(2);
    expect(handover.missing.value).toMatch(/payment/);
  });

  it('asks for a paper and a legal name only for what is ticked', () => {
    const { handover } = start(
      personOf({
        isGuest: true,
        portions: [portionOf(), second],
        reportable: ['Potassium nitrate'],
        papersMissing: [{ saltId: 'KNO3', salt: 'Potassium nitrate' }],
      }),
    );
    expect(handover.missing.value).toMatch(/paper/);
    expect(handover.asksLegalName.value).toBe(true);
    handover.ticked.value = [second.id];
    expect(handover.asksLegalName.value).toBe(false);
    expect(handover.missing.value).toBe('');
    handover.ticked.value = [];
    expect(handover.missing.value).toMatch(/Tick/);
  });

  it('lets somebody’s word stand for the payment', () => {
    const { handover } = start(personOf({ paid: false, vouchedBy: 'Ravi Achterlo' }));
    expect(handover.missing.value).toBe('');
  });

  it('sends who collects, the pass and the legal name, and closes', async () => {
    const { handover, open } = start(
      personOf({ proxyName: 'Aunt Vera', reportable: ['Potassium nitrate'] }),
      'ABCD-EFGH-JKMN-PQRS-T',
    );
    handover.collector.value = 'other';
    expect(handover.missing.value).toMatch(/who collects/);
    handover.collector.value = 'proxy';
    expect(handover.missing.value).toMatch(/legal name/);
    handover.legalName.value = ' Noor Q. Valdane ';
    expect(handover.missing.value).toBe('');
    await handover.handOver();
    expect(sent[0]).toMatchObject({
      method: 'POST',
      url: expect.stringContaining('/handovers'),
      body: {
        membershipId: personOf().membershipId,
        portionIds: [portionOf().id],
        method: 'pass',
        pass: 'ABCD-EFGH-JKMN-PQRS-T',
        collectedBy: 'Aunt Vera',
        legalName: 'Noor Q. Valdane',
      },
    });
    expect(open.value).toBe(false);
    expect(usePickupStore().deskOf(deskOf().buyId)).toEqual(deskOf());
  });

  it('stays open when it is refused, and looks at the desk again', async () => {
    const { handover, open } = start(personOf());
    reply = {
      status: 409,
      body: { type: 'about:blank', title: 'Stale', status: 409, code: 'stale', detail: 'Gone.' },
    };
    await handover.handOver();
    expect(open.value).toBe(true);
    expect(handover.problem.value?.detail).toBe('Gone.');
    await vi.waitFor(() => expect(sent.at(-1)).toMatchObject({ method: 'GET' }));
    const [first, again] = [sent[0]?.body, sent.length];
    await handover.handOver();
    // The same id: the server counts it once.
    expect(sent[again]?.body).toEqual(first);
  });
});
