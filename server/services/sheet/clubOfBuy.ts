import { select, type Tx } from '../../config/database.ts';
import { sayFor, type Say } from '../buys/sayTerms.ts';

/** What notices about a buy say of its club, in its locale and zone. */
export interface ClubWords {
  readonly slug: string;
  readonly transferHow: string;
  readonly timeZone: string;
  readonly locale: string;
  readonly say: Say;
}

/** The club's words for notices that a job sends, without an actor at hand. */
export async function clubOfBuy(clubId: string, tx: Tx): Promise<ClubWords> {
  const [row] = await select<{
    slug: string;
    transfer_how: string;
    currency: string;
    locale: string;
    time_zone: string;
  }>(
    'select slug, transfer_how, currency, locale, time_zone from clubs where id = :clubId',
    { clubId },
    tx,
  );
  if (!row) throw new Error(`no club ${clubId}`);
  return {
    slug: row.slug,
    transferHow: row.transfer_how,
    locale: row.locale,
    timeZone: row.time_zone,
    say: sayFor({ ...row, timeZone: row.time_zone }),
  };
}
