import type { BuyState } from '#shared/domain/buys/states.ts';
import type { Roles } from '#shared/schemas/fields.ts';
import { pool } from '../config/database.ts';

/** Somebody signed in, not yet looked at inside a club. */
export interface AccountActor {
  readonly accountId: string;
  readonly email: string;
  readonly accountName: string;
  readonly requestId: string;
}

export interface ActorClub {
  readonly id: string;
  readonly slug: string;
  readonly name: string;
  readonly currency: string;
  readonly locale: string;
  readonly timeZone: string;
}

/** Somebody inside a club; `status` other than active reaches only routes that say `former`. */
export interface ClubActor extends AccountActor {
  readonly club: ActorClub;
  readonly membershipId: string;
  readonly name: string;
  readonly status: 'active' | 'left' | 'removed';
  readonly roles: Roles;
}

/** Somebody before one buy: `organises` is "own buys", `helps` ends with the split day or after pickup. */
export interface BuyActor extends ClubActor {
  readonly buy: {
    readonly id: string;
    readonly state: BuyState;
    readonly responsibleId: string;
    readonly organises: boolean;
    readonly helps: boolean;
    readonly takesCash: boolean;
    readonly takesPart: boolean;
    readonly sheetVersion: number;
    readonly planVersion: number | null;
    /** The club shows most members only the total of a reportable salt. */
    readonly hidesReportable: boolean;
  };
  /** What a route had read with the actor, as JSON; whose route it is knows what. */
  readonly alongside?: unknown;
}

/** One JSON value to be read in the actor's own statement: SQL beside buys b, clubs c, with values from $4 on. */
export interface Alongside {
  readonly name: string;
  readonly sql: string;
  readonly values: readonly unknown[];
}

interface ClubRow {
  account_id: string;
  email: string;
  account_name: string;
  membership_id: string;
  name: string;
  status: 'active' | 'left' | 'removed';
  is_organiser: boolean;
  is_treasurer: boolean;
  is_steward: boolean;
  club_id: string;
  slug: string;
  club_name: string;
  currency: string;
  locale: string;
  time_zone: string;
}

const clubColumns = `a.id as account_id, a.email, a.display_name as account_name, m.id as membership_id,
  m.display_name as name, m.status, m.is_organiser, m.is_treasurer, m.is_steward,
  c.id as club_id, c.slug, c.name as club_name, c.currency, c.locale, c.time_zone`;

function asClubActor(row: ClubRow, requestId: string): ClubActor {
  return {
    accountId: row.account_id,
    email: row.email,
    accountName: row.account_name,
    requestId,
    club: {
      id: row.club_id,
      slug: row.slug,
      name: row.club_name,
      currency: row.currency,
      locale: row.locale,
      timeZone: row.time_zone,
    },
    membershipId: row.membership_id,
    name: row.name,
    status: row.status,
    roles: { organiser: row.is_organiser, treasurer: row.is_treasurer, steward: row.is_steward },
  };
}

/** The account behind a session, or null when it is gone. */
export async function findAccountActor(
  accountId: string,
  requestId: string,
): Promise<AccountActor | null> {
  const { rows } = await pool.query<{ email: string; display_name: string }>({
    name: 'account-actor',
    text: 'select email, display_name from accounts where id = $1 and deleted_at is null',
    values: [accountId],
  });
  const row = rows[0];
  return row ? { accountId, email: row.email, accountName: row.display_name, requestId } : null;
}

/** The membership of an account in a club; null when there is none or it is still pending. */
export async function findClubActor(
  accountId: string,
  clubSlug: string,
  requestId: string,
): Promise<ClubActor | null> {
  const { rows } = await pool.query<ClubRow>({
    name: 'club-actor',
    text: `select ${clubColumns} from clubs c
      join memberships m on m.club_id = c.id and m.account_id = $1 and m.status <> 'pending'
      join accounts a on a.id = m.account_id and a.deleted_at is null
      where c.slug = $2`,
    values: [accountId, clubSlug],
  });
  const row = rows[0];
  return row ? asClubActor(row, requestId) : null;
}

interface BuyRow {
  state: BuyState;
  responsible_id: string;
  organises: boolean;
  helps: boolean;
  takes_cash: boolean;
  takes_part: boolean;
  sheet_version: number;
  plan_version: number | null;
  hide_reportable_grams: boolean;
}

/** Before buy b of club c and membership m: who may see it, and as what. */
const buyColumns = `b.state, b.responsible_id, b.sheet_version, b.plan_version, c.hide_reportable_grams,
  (b.responsible_id = m.id or o.membership_id is not null) as organises,
  (h.membership_id is not null and b.state in ('arrived', 'splitting', 'pickup')
    and (b.splits_at is null
      or (now() at time zone c.time_zone)::date <= (coalesce(b.split_ends_at, b.splits_at) at time zone c.time_zone)::date)
  ) as helps,
  coalesce(h.takes_cash, false) as takes_cash,
  exists (select 1 from pledges p where p.buy_id = b.id and p.membership_id = m.id) as takes_part`;

const buyJoins = `left join buy_organisers o on o.buy_id = b.id and o.membership_id = m.id
  left join buy_helpers h on h.buy_id = b.id and h.membership_id = m.id`;

const buyIsSeen =
  '(b.opened_at is not null or m.id in (b.responsible_id, b.offered_to_id) or o.membership_id is not null)';

function asBuyActor(actor: ClubActor, buyId: string, row: BuyRow): BuyActor | null {
  const active = actor.status === 'active';
  if (!active && !row.takes_part) return null;
  return {
    ...actor,
    buy: {
      id: buyId,
      state: row.state,
      responsibleId: row.responsible_id,
      organises: active && row.organises,
      helps: active && row.helps,
      takesCash: active && row.helps && row.takes_cash,
      takesPart: row.takes_part,
      sheetVersion: row.sheet_version,
      planVersion: row.plan_version,
      hidesReportable: row.hide_reportable_grams,
    },
  };
}

/**
 * The actor before one buy of their club. Null when the buy is not of this club, is a draft or a cancelled draft that
 * the actor neither organises nor is asked to take over, or when a former member has no part in it.
 */
export async function findBuyActor(actor: ClubActor, buyId: string): Promise<BuyActor | null> {
  const { rows } = await pool.query<BuyRow>({
    name: 'buy-actor',
    text: `select ${buyColumns} from buys b
      join clubs c on c.id = b.club_id
      join memberships m on m.id = $3
      ${buyJoins}
      where b.id = $1 and b.club_id = $2 and ${buyIsSeen}`,
    values: [buyId, actor.club.id, actor.membershipId],
  });
  const row = rows[0];
  return row ? asBuyActor(actor, buyId, row) : null;
}

/** Account, membership and buy in one statement, for the routes of a buy. Null says nothing of which is missing. */
export async function findBuyActorAt(
  accountId: string,
  clubSlug: string,
  buyId: string,
  requestId: string,
  alongside?: Alongside | null,
): Promise<BuyActor | null> {
  const { rows } = await pool.query<ClubRow & BuyRow & { alongside: unknown }>({
    name: `buy-actor-at ${alongside?.name ?? ''}`,
    text: `select ${clubColumns}, ${buyColumns}, ${alongside?.sql ?? 'null'} as alongside from clubs c
      join memberships m on m.club_id = c.id and m.account_id = $1 and m.status <> 'pending'
      join accounts a on a.id = m.account_id and a.deleted_at is null
      join buys b on b.club_id = c.id and b.id = $3
      ${buyJoins}
      where c.slug = $2 and ${buyIsSeen}`,
    values: [accountId, clubSlug, buyId, ...(alongside?.values ?? [])],
  });
  const row = rows[0];
  const actor = row && asBuyActor(asClubActor(row, requestId), buyId, row);
  return actor ? { ...actor, alongside: row.alongside } : null;
}
