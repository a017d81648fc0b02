import { select, type Tx } from '../../config/database.ts';
import type { ActorClub } from '../actors.ts';
import { buyAccountBalance } from '../ledger/balances.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { clubMoney } from '../ledger/paymentWords.ts';

/** What keeps a buy from settling, and what only stays open. */
export interface OpenPoints {
  readonly blocks: string[];
  readonly notes: string[];
  readonly balanceMinor: number;
  readonly unconfirmedBills: number;
  readonly unclaimedPortions: number;
}

interface CountRow {
  bills: number;
  without_final: number;
  unclaimed: number;
}

const count = (n: number, one: string, many: string) => `${n} ${n === 1 ? one : many}`;

/** What stands open in a buy before it can settle, in words. */
export async function openPoints(buyId: string, club: ActorClub, tx?: Tx): Promise<OpenPoints> {
  const [row] = await select<CountRow>(
    `select (select count(*)::int from bills where buy_id = :buyId and confirmed_at is null and voided_at is null) as bills,
        (select count(*)::int from buy_members where buy_id = :buyId and dropped_at is null and final_minor is null
          and exists (select 1 from pledges p where p.buy_id = :buyId and p.membership_id = buy_members.membership_id
            and p.dropped_at is null and (p.wanted_mg > 0 or p.up_to_mg > 0))) as without_final,
        (select count(*)::int from portions where buy_id = :buyId and state = 'done' and handed_over_at is null) as unclaimed`,
    { buyId },
    tx,
  );
  const { bills, without_final, unclaimed } = row ?? { bills: 0, without_final: 0, unclaimed: 0 };
  const balanceMinor = await buyAccountBalance(buyId, tx);
  const owed = [...(await owedOfBuy(buyId, tx)).values()];
  const owing = owed.filter(({ openMinor }) => openMinor > 0);
  const open = owing.reduce((sum, { openMinor }) => sum + openMinor, 0);

  const blocks: string[] = [];
  if (without_final > 0) {
    blocks.push(`The final shares of ${count(without_final, 'member', 'members')} are not posted.`);
  }
  if (bills > 0) blocks.push(`${count(bills, 'bill waits', 'bills wait')} for a treasurer.`);
  if (balanceMinor !== 0) {
    blocks.push(
      `The buy's account stands at ${clubMoney(club, balanceMinor)} and must be exactly zero.`,
    );
  }
  const notes: string[] = [];
  if (owing.length > 0) {
    notes.push(
      `${count(owing.length, 'member owes', 'members owe')} ${clubMoney(club, open)}; it stays on their accounts.`,
    );
  }
  if (unclaimed > 0) notes.push(`${count(unclaimed, 'portion is', 'portions are')} not collected.`);
  return { blocks, notes, balanceMinor, unconfirmedBills: bills, unclaimedPortions: unclaimed };
}
