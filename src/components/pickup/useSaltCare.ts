import { cautionsFor, type Caution, type CautionPlace } from '#shared/domain/salts/cautions.ts';
import { factsOfSalt } from '#shared/domain/salts/factsOfSalt.ts';
import type { ClubSalt } from '#shared/schemas/salts.ts';
import { useSaltsStore } from 'src/stores/salts.ts';

export type SaltCare = { salt: ClubSalt; cautions: Caution[] };

/** What to mind about a club's salts where an act is done; empty until the salts are there. */
export function useSaltCare(club: string, place: CautionPlace) {
  const store = useSaltsStore();
  // The hazards of each container come with it; only the advice waits for this.
  if (!store.listOf(club)) store.load(club).catch(() => undefined);

  function careOf(saltIds: readonly string[]): SaltCare[] {
    return [...new Set(saltIds)].flatMap((id) => {
      const salt = store.saltOf(club, id);
      return salt ? [{ salt, cautions: cautionsFor(factsOfSalt(salt), place) }] : [];
    });
  }

  return { careOf };
}
