import type { PickupDesk, PickupPerson, PickupPortion } from '#shared/schemas/pickup.ts';

/** A weighed container of potassium nitrate that waits. */
export const portionOf = (changes: Partial<PickupPortion> = {}): PickupPortion => ({
  id: '00000000-0000-4000-8000-000000000001',
  lineId: '00000000-0000-4000-8000-0000000000a1',
  saltId: 'KNO3',
  salt: 'Potassium nitrate',
  formula: 'KNO3',
  code: '0024',
  part: 1,
  parts: 1,
  mg: 550_000,
  lot: 'TI-2601',
  signalWord: 'Warning',
  hazards: ['May intensify fire; oxidiser.'],
  handedOverAt: null,
  ...changes,
});

/** Somebody who has paid and may collect one container. */
export const personOf = (changes: Partial<PickupPerson> = {}): PickupPerson => ({
  membershipId: '00000000-0000-4000-8000-0000000000b1',
  name: 'Noor Valdane',
  isGuest: false,
  portions: [portionOf()],
  paid: true,
  owedMinor: 0,
  vouchedBy: null,
  slotId: null,
  proxyName: null,
  papersMissing: [],
  reportable: [],
  legalNameKnown: false,
  handovers: [],
  collectedAt: null,
  unclaimedAt: null,
  reminders: 0,
  ...changes,
});

/** A desk in the state pickup. */
export const deskOf = (changes: Partial<PickupDesk> = {}): PickupDesk => ({
  buyId: '00000000-0000-4000-8000-0000000000c1',
  state: 'pickup',
  termsVersion: 9,
  pickupAt: '2026-12-12T13:00:00.000Z',
  unclaimedFrom: '2027-02-10T13:00:00.000Z',
  slots: [],
  people: [],
  ...changes,
});
