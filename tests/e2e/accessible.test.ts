import AxeBuilder from '@axe-core/playwright';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startInstance, type Instance, type Person } from '#tests/support/instance.ts';

let tarewell: Instance;
const people = new Map<string, Person>();
const buys = new Map<string, string>();

beforeAll(async () => {
  tarewell = await startInstance({ demo: true });
  for (const { name, id } of await tarewell.query<{ name: string; id: string }>(
    'select name, id from buys',
  )) {
    buys.set(name.split(' ')[0] ?? '', id);
  }
});
afterAll(() => tarewell.stop());

async function personOf(who: string): Promise<Person> {
  const known = people.get(who);
  if (known) return known;
  const person =
    who === 'visitor'
      ? await tarewell.browse()
      : await tarewell.as(`${who.replace(' by phone', '')}@quillmere.example`, {
          phone: who.endsWith('by phone'),
        });
  people.set(who, person);
  return person;
}

const c = '/c/quillmere';
const pages: readonly (readonly [who: string, path: string])[] = [
  ['visitor', '/sign-in'],
  ['visitor', '/sign-up'],
  ['visitor', '/reset'],
  ['visitor', '/public/quillmere'],
  ['visitor', '/outbox'],
  ['visitor', '/nowhere'],
  ['noor', '/account'],
  ['noor', '/clubs/new'],
  ['noor', `${c}/buys`],
  ['noor', `${c}/notices`],
  ['noor', `${c}/ledger`],
  ['noor', `${c}/shelf`],
  ['noor', `${c}/salts`],
  ['noor', `${c}/buys/Winter/sheet`],
  ['noor', `${c}/buys/Autumn/split`],
  ['noor', `${c}/buys/Summer/settled`],
  ['noor by phone', `${c}/buys`],
  ['noor by phone', `${c}/buys/Winter/sheet`],
  ['noor by phone', `${c}/buys/Autumn/split`],
  ['imke', `${c}/buys/Winter/sheet`],
  ['imke', `${c}/buys/Winter/draft`],
  ['imke', `${c}/buys/Winter/notices`],
  ['imke', `${c}/buys/Spring/draft`],
  ['imke', `${c}/buys/Summer/locked`],
  ['imke', `${c}/buys/Summer/orders`],
  ['imke', `${c}/buys/Summer/arrived`],
  ['imke', `${c}/buys/Summer/pickup`],
  ['imke', `${c}/buys/Summer/settled`],
  ['imke', `${c}/suppliers`],
  ['imke by phone', `${c}/buys/Spring/draft`],
  ['imke by phone', `${c}/buys/Summer/orders`],
  ['ravi', `${c}/buys/Autumn/split`],
  ['ravi', `${c}/buys/Autumn/arrived`],
  ['ravi by phone', `${c}/buys/Autumn/split`],
  ['orla', `${c}/ledger`],
  ['orla', `${c}/buys/Autumn/locked`],
  ['orla by phone', `${c}/ledger`],
  ['teodor', `${c}/members`],
  ['teodor', `${c}/settings`],
  ['teodor', `${c}/audit`],
  ['teodor', `${c}/precursors`],
  ['teodor by phone', `${c}/members`],
];

describe('every page', () => {
  for (const [who, path] of pages) {
    it(`${path} for ${who}: axe finds nothing serious, nothing scrolls sideways, the console is quiet`, async () => {
      const { page, complaints } = await personOf(who);
      complaints.length = 0;
      await page.goto(
        path.replace(/(Winter|Autumn|Summer|Spring)/, (name) => buys.get(name) ?? name),
      );
      await page.waitForSelector('h1');
      await page.waitForLoadState('networkidle');
      await page.waitForFunction(() => !document.querySelector('[aria-busy="true"]'));
      const sideways = await page.evaluate(
        () => document.documentElement.scrollWidth > document.documentElement.clientWidth,
      );
      expect(sideways).toBe(false);
      const { violations } = await new AxeBuilder({ page }).analyze();
      const serious = violations
        .filter(({ impact }) => impact === 'serious' || impact === 'critical')
        .map(
          ({ id, nodes }) =>
            `${id}: ${nodes
              .slice(0, 3)
              .map(({ html }) => html.slice(0, 160))
              .join(' | ')}`,
        );
      expect(serious).toEqual([]);
      expect(complaints).toEqual([]);
    });
  }
});
