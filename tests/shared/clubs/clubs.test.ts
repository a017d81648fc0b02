import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { listRoles, roleNames, rolesLeftEmpty } from '#shared/domain/clubs/roles.ts';
import { longestSlug, suggestSlug } from '#shared/domain/clubs/suggestSlug.ts';
import { Password } from '#shared/schemas/accounts.ts';
import { NewSlug } from '#shared/schemas/clubs.ts';

describe('suggestSlug', () => {
  it.each([
    ['Quillmère Water Gardeners', 'quillmere-water-gardeners'],
    ["Noor's Größte Tanks & Co.", 'noors-grosste-tanks-co'],
    ['Øst  Ærø', 'ost-aero'],
    ['水草', ''],
    ['---', ''],
  ])('%s: %s', (name, slug) => {
    expect(suggestSlug(name)).toBe(slug);
  });

  it('is an address that a club may have, or nothing', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 80 }), (name) => {
        const slug = suggestSlug(name);
        expect(slug.length).toBeLessThanOrEqual(longestSlug);
        if (slug.length >= 2) expect(NewSlug.safeParse(slug).success).toBe(true);
      }),
    );
  });
});

describe('rolesLeftEmpty', () => {
  const flags = fc.record({
    organiser: fc.boolean(),
    treasurer: fc.boolean(),
    steward: fc.boolean(),
  });
  const counts = fc.record({ organiser: fc.nat(3), treasurer: fc.nat(3), steward: fc.nat(3) });

  it('names exactly the roles that somebody held and nobody will', () => {
    fc.assert(
      fc.property(counts, flags, flags, (others, held, kept) => {
        const empty = rolesLeftEmpty(others, held, kept);
        for (const role of roleNames) {
          const before = others[role] + Number(held[role]);
          const after = others[role] + Number(held[role] && kept[role]);
          expect(empty.includes(role)).toBe(before > 0 && after === 0);
        }
      }),
    );
  });

  it('reads well', () => {
    expect(listRoles([])).toBe('');
    expect(listRoles(['steward'])).toBe('steward');
    expect(listRoles(['treasurer', 'steward'])).toBe('treasurer and steward');
    expect(listRoles(roleNames)).toBe('organiser, treasurer and steward');
  });
});

describe('Password', () => {
  it.each([
    ['123456789', false],
    ['1234567890', true],
    ['x'.repeat(128), true],
    ['x'.repeat(129), false],
    // Ten characters, though twenty code units.
    ['🌱'.repeat(10), true],
    ['🌱'.repeat(9), false],
  ])('%s: %s', (text, fits) => {
    expect(Password.safeParse(text).success).toBe(fits);
  });
});
