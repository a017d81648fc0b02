import type { LineChange } from '#shared/schemas/buyTerms.ts';
import { select, type Tx } from '../../config/database.ts';
import { sayOffer } from './lineRules.ts';
import type { Say } from './sayTerms.ts';

type Fields = Omit<LineChange, 'termsVersion' | 'preview'>;

interface Changes {
  clubId: string;
  name: string;
  before: Fields;
  after: Fields;
}

const surplusWords = {
  spread: 'what is over is spread over the members',
  shelf: 'what is over goes to the shelf',
} as const;
const shortageWords = {
  scale: 'when too little comes, everyone gets the same part of what they asked for',
  queue: 'when too little comes, earlier pledges are served first',
} as const;

async function sayOffers(ids: readonly string[], say: Say, tx: Tx): Promise<string> {
  if (ids.length === 0) return '';
  const rows = await select<{ id: string; supplier_id: string; pack_mg: number; supplier: string }>(
    `select o.id, o.supplier_id, o.pack_mg, s.name as supplier from offers o join suppliers s on s.id = o.supplier_id
     where o.id in (:ids) order by o.pack_mg, o.id`,
    { ids },
    tx,
  );
  return rows.map((row) => sayOffer(row, say.pack)).join(', ');
}

async function saySource({ before, after }: Changes, say: Say, tx: Tx): Promise<string[]> {
  if (before.anyOfSupplierId !== after.anyOfSupplierId) {
    if (!after.anyOfSupplierId) return [`bought as ${await sayOffers(after.offerIds, say, tx)}`];
    const [supplier] = await select<{ name: string }>(
      'select name from suppliers where id = :id',
      { id: after.anyOfSupplierId },
      tx,
    );
    return [`bought as any offer of ${supplier?.name ?? 'the supplier'}`];
  }
  const added = after.offerIds.filter((id) => !before.offerIds.includes(id));
  const gone = before.offerIds.filter((id) => !after.offerIds.includes(id));
  return [
    ...(added.length > 0 ? [`may now be bought as ${await sayOffers(added, say, tx)}`] : []),
    ...(gone.length > 0 ? [`no longer bought as ${await sayOffers(gone, say, tx)}`] : []),
  ];
}

/** One sentence on what changed about a line; empty when nothing did. */
export async function sayLineChanges(changes: Changes, say: Say, tx: Tx): Promise<string> {
  const { name, before, after } = changes;
  const parts = [
    ...(await saySource(changes, say, tx)),
    ...(before.stepMg === after.stepMg
      ? []
      : [`portions in steps of ${say.mass(after.stepMg)}, before ${say.mass(before.stepMg)}`]),
    ...(before.reservePermyriad === after.reservePermyriad
      ? []
      : [
          `handling reserve ${say.percent(after.reservePermyriad / 10)}, before ${say.percent(before.reservePermyriad / 10)}`,
        ]),
    ...(before.surplus === after.surplus ? [] : [surplusWords[after.surplus]]),
    ...(before.shortage === after.shortage ? [] : [shortageWords[after.shortage]]),
    ...(before.note === after.note
      ? []
      : [after.note ? `note “${after.note}”` : 'its note is gone']),
  ];
  return parts.length === 0 ? '' : `${name}: ${parts.join('; ')}.`;
}
