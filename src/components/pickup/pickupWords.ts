import type { PickupDesk, PickupPerson, PickupSlot } from '#shared/schemas/pickup.ts';
import type { ChipTone } from 'src/components/common/StateChip.vue';
import type { Format } from 'src/composables/useFormat.ts';

/** 'Sat 12 Dec, 14:00 to 15:00' */
export const slotTime = (slot: PickupSlot, format: Format) =>
  `${format.date(slot.startsAt)}, ${format.time(slot.startsAt)} to ${format.time(slot.endsAt)}`;

/** How much room a slot has left, in words; nothing where it has no limit. */
export function roomLeft({ capacity, taken }: PickupSlot): string {
  if (capacity === null) return '';
  const left = Math.max(0, capacity - taken);
  if (left === 0) return 'full';
  return left === 1 ? '1 place left' : `${left} places left`;
}

export const containers = (count: number) => (count === 1 ? '1 container' : `${count} containers`);

/** Portions of a person that still wait. */
export const waitingOf = ({ portions }: Pick<PickupPerson, 'portions'>) =>
  portions.filter(({ handedOverAt }) => handedOverAt === null);

/** Whether money or somebody's word lets this person collect. */
export function paidChip(person: PickupPerson): { label: string; tone: ChipTone } {
  if (person.paid) return { label: 'Paid', tone: 'moss' };
  if (person.vouchedBy) return { label: `${person.vouchedBy} vouches`, tone: 'slate' };
  return { label: 'Not paid', tone: 'amber' };
}

/** Who still collects, by slot and name, and who has nothing left to collect. */
export function sortPeople({ people, slots }: PickupDesk) {
  const place = (person: PickupPerson) => {
    const index = slots.findIndex(({ id }) => id === person.slotId);
    return index < 0 ? slots.length : index;
  };
  const waiting = people
    .filter((person) => waitingOf(person).length > 0)
    .sort((a, b) => place(a) - place(b) || a.name.localeCompare(b.name));
  const done = people.filter((person) => waitingOf(person).length === 0);
  return { waiting, done };
}
