import type { LineSalt } from '#shared/domain/buys/sheetTerms.ts';
import { findCatalogueSalt } from '#shared/domain/salts/findCatalogueSalt.ts';
import type { Tx } from '../../config/database.ts';
import { describeLineSalt } from '../buys/lineSalts.ts';
import { findSalt } from '../salts/saltsOfClub.ts';

/** Whether a salt is classified or reportable; the club's own are read, the shipped list's are at hand. */
export async function careOfSalt(
  clubId: string,
  saltId: string,
  tx?: Tx,
): Promise<Pick<LineSalt, 'name' | 'classified' | 'reportable'>> {
  if (findCatalogueSalt(saltId)) return describeLineSalt(saltId, null);
  const own = await findSalt(clubId, saltId, tx);
  return own ?? { name: saltId, classified: false, reportable: false };
}
