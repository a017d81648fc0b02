import type { MyPickup, PickupDesk, PickupPerson, PickupSlot } from '#shared/schemas/pickup.ts';
import { select, type Tx } from '../../config/database.ts';
import { canSeeOwed } from '../../policies/pickup.ts';
import type { BuyActor } from '../actors.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { notFound } from '../problem.ts';
import { passOf } from './passes.ts';
import { portionsOf, wirePortion, type PortionOfMember } from './portionsOf.ts';

const day = 86_400_000;

interface BuyRow {
  club_id: string;
  state: PickupDesk['state'];
  terms_version: number;
  pickup_at: Date | null;
  unclaimed_days: number;
  place: string;
  pickup_rules: string;
}

async function buyRow(buyId: string, tx?: Tx): Promise<BuyRow> {
  const [row] = await select<BuyRow>(
    `select club_id, state, terms_version, pickup_at, unclaimed_days, place, pickup_rules from buys where id = :buyId`,
    { buyId },
    tx,
  );
  if (!row) throw notFound('This buy');
  return row;
}

interface SlotRow {
  id: string;
  starts_at: Date;
  ends_at: Date;
  place: string;
  capacity: number | null;
  taken: number;
}

/** The slots of a buy, earliest first, with how many have chosen each. */
export async function slotsOf(buyId: string, tx?: Tx): Promise<PickupSlot[]> {
  const rows = await select<SlotRow>(
    `select s.id, s.starts_at, s.ends_at, s.place, s.capacity,
        (select count(*)::int from buy_members m where m.slot_id = s.id) as taken
     from pickup_slots s where s.buy_id = :buyId order by s.starts_at, s.id`,
    { buyId },
    tx,
  );
  return rows.map((row) => ({
    id: row.id,
    startsAt: row.starts_at.toISOString(),
    endsAt: row.ends_at.toISOString(),
    place: row.place,
    capacity: row.capacity,
    taken: row.taken,
  }));
}

interface PersonRow {
  id: string;
  name: string;
  is_guest: boolean;
  legal_name: string | null;
  vouched_by: string | null;
  slot_id: string | null;
  proxy_name: string | null;
  collected_at: Date | null;
  unclaimed_at: Date | null;
  reminders: number;
  papers: string[];
  handovers: {
    id: string;
    at: string;
    by: string;
    byId: string;
    collectedBy: string;
    portions: number;
  }[];
}

async function personRows(buyId: string, tx?: Tx): Promise<PersonRow[]> {
  return select<PersonRow>(
    `select m.id, m.display_name as name, m.is_guest, m.legal_name, v.display_name as vouched_by, bm.slot_id,
        bm.proxy_name, bm.collected_at, bm.unclaimed_at, coalesce(bm.reminders, 0) as reminders,
        coalesce((select json_agg(h.salt_id) from hazard_confirmations h
          where h.membership_id = m.id and h.on_paper_by_id is not null), '[]'::json) as papers,
        coalesce((select json_agg(json_build_object('id', h.id,
            'at', to_char(h.created_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"'),
            'by', hb.display_name, 'byId', hb.id, 'collectedBy', h.collected_by,
            'portions', (select count(*) from portions p where p.handover_id = h.id)) order by h.created_at)
          from handovers h join memberships hb on hb.id = h.handed_by_id
          where h.buy_id = :buyId and h.membership_id = m.id and h.undone_at is null), '[]'::json) as handovers
     from memberships m
     left join buy_members bm on bm.buy_id = :buyId and bm.membership_id = m.id
     left join memberships v on v.id = bm.vouched_by_id
     where exists (select 1 from portions p where p.buy_id = :buyId and p.membership_id = m.id and p.state = 'done')
     order by lower(m.display_name), m.id`,
    { buyId },
    tx,
  );
}

function papersMissing(person: PersonRow, portions: readonly PortionOfMember[]) {
  if (!person.is_guest) return [];
  const missing = new Map(
    portions
      .filter(({ classified, saltId }) => classified && !person.papers.includes(saltId))
      .map(({ saltId, salt }) => [saltId, salt]),
  );
  return [...missing].map(([saltId, salt]) => ({ saltId, salt }));
}

/** Everybody with a share to hand over, and what stands in the way of it. */
export async function readDesk(actor: BuyActor, tx?: Tx): Promise<PickupDesk> {
  const buyId = actor.buy.id;
  const buy = await buyRow(buyId, tx);
  const portions = await portionsOf({ id: buyId, clubId: buy.club_id }, tx);
  const owed = await owedOfBuy(buyId, tx);
  const sums = canSeeOwed(actor);
  const people = (await personRows(buyId, tx)).map((person): PickupPerson => {
    const own = portions.filter(({ membershipId }) => membershipId === person.id);
    const openMinor = owed.get(person.id)?.openMinor ?? 0;
    return {
      membershipId: person.id,
      name: person.name,
      isGuest: person.is_guest,
      portions: own.map(wirePortion),
      paid: openMinor === 0,
      owedMinor: sums ? openMinor : null,
      vouchedBy: person.vouched_by,
      slotId: person.slot_id,
      proxyName: person.proxy_name,
      papersMissing: papersMissing(person, own),
      reportable: [...new Set(own.filter(({ reportable }) => reportable).map(({ salt }) => salt))],
      legalNameKnown: person.legal_name !== null && person.legal_name !== '',
      handovers: person.handovers.map(({ byId, ...made }) => ({
        ...made,
        mayUndo:
          buy.state === 'pickup' &&
          (actor.buy.organises || (actor.buy.helps && byId === actor.membershipId)),
      })),
      collectedAt: person.collected_at?.toISOString() ?? null,
      unclaimedAt: person.unclaimed_at?.toISOString() ?? null,
      reminders: person.reminders,
    };
  });
  return {
    buyId,
    state: buy.state,
    termsVersion: buy.terms_version,
    pickupAt: buy.pickup_at?.toISOString() ?? null,
    unclaimedFrom: buy.pickup_at
      ? new Date(buy.pickup_at.getTime() + buy.unclaimed_days * day).toISOString()
      : null,
    slots: await slotsOf(buyId, tx),
    people,
  };
}

/** One's own pickup; the pass shows once the split is over and something waits. */
export async function readMyPickup(actor: BuyActor): Promise<MyPickup> {
  const buyId = actor.buy.id;
  const buy = await buyRow(buyId);
  const portions = await portionsOf(
    { id: buyId, clubId: buy.club_id },
    undefined,
    actor.membershipId,
  );
  const [own] = await select<{
    slot_id: string | null;
    proxy_name: string | null;
    vouched_at: Date | null;
    collected_at: Date | null;
  }>(
    `select slot_id, proxy_name, vouched_at, collected_at from buy_members
     where buy_id = :buyId and membership_id = :membershipId`,
    { buyId, membershipId: actor.membershipId },
  );
  const waits =
    buy.state === 'pickup' && portions.some(({ handedOverAt }) => handedOverAt === null);
  return {
    portions: portions.map(wirePortion),
    owedMinor: (await owedOfBuy(buyId)).get(actor.membershipId)?.openMinor ?? 0,
    vouched: (own?.vouched_at ?? null) !== null,
    slots: await slotsOf(buyId),
    slotId: own?.slot_id ?? null,
    place: buy.place,
    rules: buy.pickup_rules,
    proxyName: own?.proxy_name ?? null,
    pass: waits ? passOf(buyId, actor.membershipId) : null,
    collectedAt: own?.collected_at?.toISOString() ?? null,
  };
}
