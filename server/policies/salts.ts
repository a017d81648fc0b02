import type { ClubStanding } from './actor.ts';

/** Reading salts, suppliers, offers and their prices: every member. */
export const canReadSalts = (actor: ClubStanding) => actor.status === 'active';

/** The club's salt list, its own salts and which are hidden: stewards. */
export const canEditSalts = (actor: ClubStanding) =>
  actor.status === 'active' && actor.roles.steward;

/** Suppliers, offers and their import: organisers and stewards. */
export const canEditSuppliers = (actor: ClubStanding) =>
  actor.status === 'active' && (actor.roles.organiser || actor.roles.steward);
