import { select, type Tx } from '../../config/database.ts';
import { loadSheetTerms } from '../buys/loadSheetTerms.ts';

/** Lines of which the club tells most members only the total. */
export async function hiddenLines(buyId: string, tx?: Tx): Promise<Set<string>> {
  const [club] = await select<{ hides: boolean }>(
    'select c.hide_reportable_grams as hides from buys b join clubs c on c.id = b.club_id where b.id = :buyId',
    { buyId },
    tx,
  );
  if (!club?.hides) return new Set();
  const { lines } = await loadSheetTerms(buyId, tx);
  return new Set(lines.filter(({ totalsOnly }) => totalsOnly).map(({ id }) => id));
}
