import {
  computeOwed,
  type BuyAccount,
  type BuyOwed,
  type MemberOwed,
} from '#shared/domain/ledger/owed.ts';
import { select, type Tx } from '../../config/database.ts';

interface BalanceRow {
  membership_id: string;
  buy_id: string | null;
  balance: number;
}

interface DueRow {
  membership_id: string;
  buy_id: string;
  due_minor: number;
  final_minor: number | null;
  held: boolean;
  due_at: Date | null;
}

const dueStates = "('locked', 'ordered', 'arrived', 'splitting', 'pickup', 'settled')";

async function readRows(clubId: string, memberIds: readonly string[] | undefined, tx?: Tx) {
  const some = memberIds ? 'in (:memberIds)' : 'is not null';
  const values = { clubId, memberIds: memberIds ?? [] };
  const balances = await select<BalanceRow>(
    `select a.ref_id as membership_id, p.buy_id, sum(p.amount_minor)::bigint as balance
     from ledger_accounts a join ledger_postings p on p.account_id = a.id
     where a.club_id = :clubId and a.kind = 'member' and a.ref_id ${some}
     group by a.ref_id, p.buy_id`,
    values,
    tx,
  );
  const dues = await select<DueRow>(
    `select m.membership_id, m.buy_id, m.final_minor, b.due_at,
        case when m.final_minor is null and m.dropped_at is null and b.state in ${dueStates}
          then coalesce(m.due_minor, 0) else 0 end as due_minor,
        b.state = 'open' and exists (
          select 1 from pledges p where p.buy_id = m.buy_id and p.membership_id = m.membership_id
            and p.dropped_at is null and (p.wanted_mg > 0 or p.up_to_mg > 0)) as held
     from buy_members m join buys b on b.id = m.buy_id
     where b.club_id = :clubId and m.membership_id ${some}`,
    values,
    tx,
  );
  return { balances, dues };
}

/**
 * What each member owes or may have back, with credit used for the oldest due first; members who never owed or paid
 * are missing. `memberIds` narrows it.
 */
export async function owedInClub(
  clubId: string,
  tx?: Tx,
  memberIds?: readonly string[],
): Promise<Map<string, MemberOwed>> {
  if (memberIds?.length === 0) return new Map();
  const [club] = await select<{ currency: string }>(
    'select currency from clubs where id = :clubId',
    { clubId },
    tx,
  );
  if (!club) throw new Error(`no club ${clubId}`);
  const { balances, dues } = await readRows(clubId, memberIds, tx);

  const general = new Map<string, number>();
  const accounts = new Map<string, Map<string, BuyAccount>>();
  const put = (memberId: string, account: BuyAccount) => {
    const own = accounts.get(memberId) ?? new Map<string, BuyAccount>();
    accounts.set(memberId, own.set(account.buyId, account));
  };
  for (const row of dues) {
    put(row.membership_id, {
      buyId: row.buy_id,
      dueMinor: row.due_minor,
      balanceMinor: 0,
      finalMinor: row.final_minor,
      heldAsDeposit: row.held,
      dueAtMs: row.due_at?.getTime() ?? null,
    });
  }
  for (const { membership_id, buy_id, balance } of balances) {
    if (buy_id === null) general.set(membership_id, balance);
    else {
      const known = accounts.get(membership_id)?.get(buy_id) ?? {
        buyId: buy_id,
        dueMinor: 0,
        finalMinor: null,
        heldAsDeposit: false,
        dueAtMs: null,
      };
      put(membership_id, { ...known, balanceMinor: balance });
    }
  }
  const members = new Set([...general.keys(), ...accounts.keys()]);
  return new Map(
    [...members].map((memberId) => [
      memberId,
      computeOwed(
        general.get(memberId) ?? 0,
        [...(accounts.get(memberId)?.values() ?? [])],
        club.currency,
      ),
    ]),
  );
}

/** One member's standing; zeros when nothing was ever asked of them. */
export async function owedOfMember(
  clubId: string,
  membershipId: string,
  tx?: Tx,
): Promise<MemberOwed> {
  const owed = await owedInClub(clubId, tx, [membershipId]);
  return owed.get(membershipId) ?? computeOwed(0, [], 'EUR');
}

/** Each member's standing in one buy, credit of others used; members of the buy without dues are missing. */
export async function owedOfBuy(buyId: string, tx?: Tx): Promise<Map<string, BuyOwed>> {
  const rows = await select<{ club_id: string; membership_id: string }>(
    `select b.club_id, x.membership_id from buys b join (
        select buy_id, membership_id from buy_members where buy_id = :buyId
        union
        select p.buy_id, a.ref_id from ledger_postings p
          join ledger_accounts a on a.id = p.account_id and a.kind = 'member' where p.buy_id = :buyId
      ) x on x.buy_id = b.id where b.id = :buyId`,
    { buyId },
    tx,
  );
  const [first] = rows;
  if (!first) return new Map();
  const owed = await owedInClub(
    first.club_id,
    tx,
    rows.map((row) => row.membership_id),
  );
  const found = new Map<string, BuyOwed>();
  for (const [memberId, { buys }] of owed) {
    const own = buys.find((buy) => buy.buyId === buyId);
    if (own) found.set(memberId, own);
  }
  return found;
}

/** Buys, other than one, in which the member is past the due day with something still asked for and nobody vouching. */
export async function overdueElsewhere(
  membershipId: string,
  exceptBuyId: string,
  tx?: Tx,
): Promise<{ buyId: string; buyName: string; openMinor: number }[]> {
  const rows = await select<{ club_id: string; buy_id: string; name: string }>(
    `select b.club_id, b.id as buy_id, b.name from buy_members m join buys b on b.id = m.buy_id
     where m.membership_id = :membershipId and b.id <> :exceptBuyId and b.due_at < clock_timestamp()
       and m.vouched_at is null`,
    { membershipId, exceptBuyId },
    tx,
  );
  const [first] = rows;
  if (!first) return [];
  const { buys } = await owedOfMember(first.club_id, membershipId, tx);
  return rows.flatMap(({ buy_id, name }) => {
    const openMinor = buys.find((buy) => buy.buyId === buy_id)?.openMinor ?? 0;
    return openMinor > 0 ? [{ buyId: buy_id, buyName: name, openMinor }] : [];
  });
}
