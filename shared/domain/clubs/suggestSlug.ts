/** Longest address of a club, in characters. */
export const longestSlug = 40;

/**
 * An address for a club from its name: lower-case letters, digits and single hyphens.
 *
 * @example suggestSlug('Quillmère Water Gardeners') // 'quillmere-water-gardeners'
 * @returns '' when the name has no letter or digit of the Latin script
 */
export function suggestSlug(name: string): string {
  const plain = name
    .replace(/ß/g, 'ss')
    .replace(/[øØ]/g, 'o')
    .replace(/[æÆ]/g, 'ae')
    .replace(/[łŁ]/g, 'l')
    .replace(/[đĐ]/g, 'd')
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .replace(/['’]/g, '')
    .toLowerCase();
  return plain
    .replace(/[^a-z0-9]+/g, '-')
    .slice(0, longestSlug)
    .replace(/^-+|-+$/g, '');
}
