import type { RouteLocationNormalized, RouteLocationRaw } from 'vue-router';
import { readNext } from 'src/composables/readNext.ts';

type Visitor = {
  signedIn: boolean;
  firstRun: boolean;
  homeClub: { clubSlug: string } | null;
  memberships: unknown[];
  findMembership: (slug: string) => unknown;
};

/** Where a visitor who asks for `/` belongs; `null`: they wait there to be let into a club. */
export function homeFor(visitor: Visitor): string | null {
  if (visitor.firstRun) return '/welcome';
  if (!visitor.signedIn) return '/sign-in';
  if (visitor.homeClub) return `/c/${visitor.homeClub.clubSlug}/buys`;
  return visitor.memberships.length > 0 ? null : '/clubs/new';
}

/** Lets a visitor through, or says where to go instead. */
export function decide(to: RouteLocationNormalized, visitor: Visitor): true | RouteLocationRaw {
  if (to.path === '/') return homeFor(visitor) ?? true;
  if (to.meta.needs === 'session' && !visitor.signedIn) {
    return { path: '/sign-in', query: { next: to.fullPath } };
  }
  if (to.meta.needs === 'guest' && visitor.signedIn) {
    return readNext(to.query.next) ?? homeFor(visitor) ?? '/';
  }
  const { club } = to.params;
  if (to.meta.needs === 'session' && typeof club === 'string' && !visitor.findMembership(club)) {
    return {
      name: 'not-found',
      params: { path: to.path.slice(1).split('/') },
      query: to.query,
      hash: to.hash,
    };
  }
  return true;
}
