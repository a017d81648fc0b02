import type { CatalogueSalt } from './catalogueTypes.ts';
import { catalogue } from './data/catalogue.ts';

const byId: ReadonlyMap<string, CatalogueSalt> = new Map(catalogue.map((salt) => [salt.id, salt]));

/** A salt of the shipped list with all its facts, or null. In a page, import this lazily: it brings the whole list. */
export function findCatalogueSalt(id: string): CatalogueSalt | null {
  return byId.get(id) ?? null;
}
