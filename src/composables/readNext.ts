/** Where to go after sign-in: only a path of this site, never another site's address. */
export const readNext = (next: unknown): string | null =>
  typeof next === 'string' && /^\/(?![/\\])/.test(next) ? next : null;
