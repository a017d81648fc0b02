/** Roles that a membership may carry, in the order in which they are named. */
export const roleNames = ['organiser', 'treasurer', 'steward'] as const;
export type RoleName = (typeof roleNames)[number];

/** How many active members hold each role. */
export type RoleCounts = Readonly<Record<RoleName, number>>;

/**
 * Roles that nobody would hold any more.
 * @param others how many other active members hold each role
 * @param held what the person holds now
 * @param kept what they will still hold
 */
export function rolesLeftEmpty(
  others: RoleCounts,
  held: Readonly<Record<RoleName, boolean>>,
  kept: Readonly<Record<RoleName, boolean>>,
): RoleName[] {
  return roleNames.filter((role) => held[role] && !kept[role] && others[role] === 0);
}

/** 'steward', 'treasurer and steward', 'organiser, treasurer and steward'. */
export function listRoles(roles: readonly RoleName[]): string {
  if (roles.length < 2) return roles[0] ?? '';
  return `${roles.slice(0, -1).join(', ')} and ${roles[roles.length - 1]}`;
}
