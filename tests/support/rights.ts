import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { allRoutes } from '#server/routes/index.ts';
import type { RouteDef } from '#server/middlewares/route.ts';
import { browser } from './client.ts';
import { makeWorld, type World } from './world.ts';

export type Part = Exclude<keyof World['people'], 'stranger'>;
const parts: readonly Part[] = [
  'member',
  'organiser',
  'own',
  'treasurer',
  'steward',
  'helper',
  'cashHelper',
];

/** Who may call a route: everyone in the club, or the parts named. `own` is the organiser of the buy at hand. */
export type MayTable = Record<string, 'anyone' | 'account' | 'everyone' | readonly Part[]>;

function nameOf(route: RouteDef): string {
  return `${route.method.toUpperCase()} ${route.path}`;
}

/**
 * Checks a feature's routes against a table written by hand from the product's rights: signed out 401, another club 404,
 * another's buy 404, not allowed 403. Each call goes over HTTP with an empty body, which a refusal must not look at.
 * @param prefix routes of `allRoutes` that belong to the feature
 */
export function describeRights(
  feature: string,
  owns: (route: RouteDef) => boolean,
  may: MayTable,
  state: World['buy']['state'] = 'open',
): void {
  describe(`${feature}: who may`, () => {
    let world: World;
    const routes = allRoutes.filter(owns);
    beforeAll(async () => {
      world = await makeWorld(state);
    });
    afterAll(() => undefined);

    it('has every route in the table and no other', () => {
      expect(routes.map(nameOf).sort()).toEqual(Object.keys(may).sort());
    });

    const url = (route: RouteDef, buyId = world.buy.id) =>
      `/api/v1${route.path
        .replace(':club', world.club.slug)
        .replace(':buy', buyId)
        .replace(':line', world.line.id)
        .replace(/:(\w+)/g, () => randomUUID())}`;

    for (const route of routes) {
      const who = may[nameOf(route)];
      if (who === undefined || who === 'anyone') continue;
      it(`${nameOf(route)}: signed out 401`, async () => {
        await browser()[route.method](url(route)).send({}).expect(401);
      });
      if (who === 'account') continue;
      it(`${nameOf(route)}: another club 404`, async () => {
        const agent = await world.people.stranger.agent();
        await agent[route.method](url(route)).send({}).expect(404);
      });
      if (route.level === 'buy') {
        it(`${nameOf(route)}: no such buy 404`, async () => {
          const agent = await world.people.own.agent();
          await agent[route.method](url(route, randomUUID())).send({}).expect(404);
        });
      }
      if (who === 'everyone') continue;
      for (const part of parts.filter((name) => !who.includes(name))) {
        it(`${nameOf(route)}: ${part} 403`, async () => {
          const agent = await world.people[part].agent();
          await agent[route.method](url(route)).send({}).expect(403);
        });
      }
      for (const part of who) {
        it(`${nameOf(route)}: ${part} is let in`, async () => {
          const agent = await world.people[part].agent();
          const { status } = await agent[route.method](url(route)).send({});
          expect([401, 403]).not.toContain(status);
        });
      }
    }
  });
}
