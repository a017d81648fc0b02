import { describe, expect, it } from 'vitest';
import { writePass } from '#shared/domain/pickup/passCode.ts';
import type { PickupPerson, PickupSlot } from '#shared/schemas/pickup.ts';
import { passAddress, passInText } from 'src/components/pickup/passInText.ts';
import { drawSquare } from 'src/components/pickup/qrSquare.ts';
import { paidChip, roomLeft, sortPeople } from 'src/components/pickup/pickupWords.ts';
import { deskOf, portionOf, personOf } from './desk.ts';

const pass = writePass(new Uint8Array([1, 2, 3, 4, 5, 6, 7, 8, 9, 250]));

describe('a pass', () => {
  it('is read as typed, and out of the address that its square holds', () => {
    const address = passAddress('http://127.0.0.1:4680/c/quillmere/buys/x/pickup', pass);
    for (const text of [pass, pass.toLowerCase().replaceAll('-', ' '), address]) {
      expect(passInText(text)).toBe(pass);
    }
    const wrong = pass.slice(0, -1) + (pass.endsWith('A') ? 'B' : 'A');
    for (const text of ['Noor', '', wrong, passAddress('http://x/pickup', wrong)]) {
      expect(passInText(text)).toBeNull();
    }
  });

  it('is drawn with its three corners and a quiet zone of four', async () => {
    const { size, path } = await drawSquare(passAddress('http://127.0.0.1/pickup', pass));
    expect((size - 8 - 17) % 4).toBe(0);
    for (const corner of [`M4 4h`, `M${size - 5} 4h`, `M4 ${size - 5}h`])
      expect(path).toContain(corner);
    expect(path).not.toMatch(/M[0-3] /);
  });
});

describe('the desk’s words', () => {
  const slot = (capacity: number | null, taken: number): PickupSlot => ({
    id: 'slot',
    startsAt: '2026-12-12T13:00:00.000Z',
    endsAt: '2026-12-12T14:00:00.000Z',
    place: '',
    capacity,
    taken,
  });

  it.each([
    [slot(null, 40), ''],
    [slot(6, 4), '2 places left'],
    [slot(6, 5), '1 place left'],
    [slot(6, 6), 'full'],
    [slot(2, 3), 'full'],
  ])('say how much room is left', (one, words) => {
    expect(roomLeft(one)).toBe(words);
  });

  it.each<[Partial<PickupPerson>, string]>([
    [{ paid: true }, 'Paid'],
    [{ paid: false, vouchedBy: 'Ravi' }, 'Ravi vouches'],
    [{ paid: false }, 'Not paid'],
  ])('say whether money lets somebody collect', (changes, label) => {
    expect(paidChip(personOf(changes)).label).toBe(label);
  });

  it('put who waits by slot and then by name, and who has collected apart', () => {
    const desk = deskOf({
      slots: [
        { ...slot(null, 1), id: 'early' },
        { ...slot(null, 1), id: 'late' },
      ],
      people: [
        personOf({ membershipId: '1', name: 'Ann' }),
        personOf({ membershipId: '2', name: 'Bo', slotId: 'late' }),
        personOf({ membershipId: '3', name: 'Cy', slotId: 'early' }),
        personOf({
          membershipId: '4',
          name: 'Di',
          portions: [portionOf({ handedOverAt: '2026-12-12T13:05:00.000Z' })],
        }),
      ],
    });
    const { waiting, done } = sortPeople(desk);
    expect(waiting.map(({ name }) => name)).toEqual(['Cy', 'Bo', 'Ann']);
    expect(done.map(({ name }) => name)).toEqual(['Di']);
  });
});
