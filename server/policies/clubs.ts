import type { ClubStanding } from './actor.ts';

const isActive = (actor: ClubStanding) => actor.status === 'active';

/** The club's own particulars, who is in it, one's own name in it, leaving it. */
export const canReadClub = isActive;

/** Name, note, money and time, places, how to pay, how people join. */
export const canChangeClub = (actor: ClubStanding) => isActive(actor) && actor.roles.steward;

/** How much of what is left over the club's shelf may pay for. */
export const canSetShelfLimit = (actor: ClubStanding) => isActive(actor) && actor.roles.treasurer;

/** Inviting, approving, removing, roles, guests; those who ask to join and former members. */
export const canManageMembers = (actor: ClubStanding) => isActive(actor) && actor.roles.steward;

/** Addresses of everyone. Organisers see those of their own buys' people, which the query decides. */
export const canSeeEmails = (actor: ClubStanding) =>
  isActive(actor) && (actor.roles.treasurer || actor.roles.steward);

/** What everyone owes or has too much. */
export const canSeeBalances = (actor: ClubStanding) => isActive(actor) && actor.roles.treasurer;

/** Who did what, and when. */
export const canReadAudit = (actor: ClubStanding) => isActive(actor) && actor.roles.steward;
