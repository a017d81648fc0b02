import type { DemoPerson } from '#shared/schemas/session.ts';

export type DemoRole = 'member' | 'organiser' | 'treasurer' | 'steward';

const roles: readonly DemoRole[] = ['member', 'organiser', 'treasurer', 'steward'];

/** For each role the person who has little else beside it; people come with fewest roles first. */
export function pickDemoPeople(
  people: readonly DemoPerson[],
): { role: DemoRole; person: DemoPerson }[] {
  return roles.flatMap((role) => {
    const person = people.find((one) =>
      role === 'member' ? one.roles.length === 0 : one.roles.includes(role),
    );
    return person ? [{ role, person }] : [];
  });
}
