import { describe, expect, it } from 'vitest';
import type { RouteLocationNormalized } from 'vue-router';
import { readNext } from 'src/composables/readNext.ts';
import { decide, homeFor } from 'src/router/guard.ts';

const fen = { clubSlug: 'fen' };
const visitor = {
  signedIn: false,
  firstRun: false,
  homeClub: null,
  memberships: [],
  findMembership: () => null,
};
const member = {
  ...visitor,
  signedIn: true,
  homeClub: fen,
  memberships: [fen],
  findMembership: (slug: string) => (slug === 'fen' ? fen : null),
};

const to = (path: string, needs: 'session' | 'guest' | 'none', rest: object = {}) =>
  ({
    path,
    fullPath: path,
    params: {},
    query: {},
    hash: '',
    meta: { needs, layout: 'main', title: '' },
    ...rest,
  }) as RouteLocationNormalized & object;

describe('homeFor', () => {
  it.each([
    ['an empty installation', { ...visitor, firstRun: true }, '/welcome'],
    ['a visitor', visitor, '/sign-in'],
    ['a member', member, '/c/fen/buys'],
    ['an account without a club', { ...visitor, signedIn: true }, '/clubs/new'],
    ['one who waits to be let in', { ...visitor, signedIn: true, memberships: [fen] }, null],
  ])('sends %s where they belong', (_who, who, home) => {
    expect(homeFor(who)).toBe(home);
  });
});

describe('decide', () => {
  it('asks a visitor to sign in and keeps the way back', () => {
    expect(decide(to('/c/fen/buys', 'session'), visitor)).toEqual({
      path: '/sign-in',
      query: { next: '/c/fen/buys' },
    });
  });

  it('sends who is signed in away from guest pages, to where they were going', () => {
    expect(decide(to('/sign-in', 'guest'), member)).toBe('/c/fen/buys');
    const going = to('/sign-in', 'guest', { query: { next: '/c/fen/ledger' } });
    expect(decide(going, member)).toBe('/c/fen/ledger');
  });

  it('shows another club as if it were not there', () => {
    const other = to('/c/moss/buys', 'session', { params: { club: 'moss' } });
    expect(decide(other, member)).toMatchObject({ name: 'not-found' });
    const own = to('/c/fen/buys', 'session', { params: { club: 'fen' } });
    expect(decide(own, member)).toBe(true);
  });

  it('lets anyone see a public page', () => {
    expect(decide(to('/public/fen', 'none', { params: { club: 'fen' } }), visitor)).toBe(true);
  });
});

describe('readNext', () => {
  it.each([
    ['/c/fen/buys?only=mine', '/c/fen/buys?only=mine'],
    ['//elsewhere.example/', null],
    ['/\\elsewhere.example/', null],
    ['https://elsewhere.example/', null],
    [undefined, null],
    [['/a', '/b'], null],
  ])('reads %s as %s', (next, path) => {
    expect(readNext(next)).toBe(path);
  });
});
