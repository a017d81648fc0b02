import type { NextFacts } from '#shared/domain/buys/nextStep.ts';
import type { BuyState } from '#shared/domain/buys/states.ts';

/** One buy as lists and headers need it: its row, its counts and the viewer's part. */
export interface BuyFactsRow {
  id: string;
  name: string;
  state: BuyState;
  terms_version: number;
  sheet_version: number;
  minimum_kind: 'none' | 'mass' | 'value' | 'members';
  minimum_amount: number;
  price_limit_permille: number;
  due_days: number;
  due_at: Date | null;
  split_ends_at: Date | null;
  pickup_rules: string;
  note: string;
  lowering_freeze_hours: number;
  left_over_payer: 'members' | 'shelf';
  shelf_limit_minor: number;
  club_shelf_limit_minor: number;
  spread_max_permille: number;
  band_permille: number;
  unclaimed_days: number;
  copied_from_id: string | null;
  copied_from_name: string | null;
  reopen_reason: string | null;
  cancel_reason: string | null;
  opened_at: Date | null;
  locked_at: Date | null;
  ordered_at: Date | null;
  arrived_at: Date | null;
  splitting_at: Date | null;
  pickup_at: Date | null;
  settled_at: Date | null;
  cancelled_at: Date | null;
  responsible_id: string;
  responsible_name: string;
  offered_to_id: string | null;
  offered_to_name: string | null;
  closes_at: Date | null;
  frozen_at: Date | null;
  frozen_until: Date | null;
  splits_at: Date | null;
  place: string;
  target_version: number;
  created_at: Date;
  lines: number;
  members: number;
  pledged_mg: number;
  mine_mg: number;
  organises: boolean;
  over_limit: number;
  must_agree: boolean | null;
  collected: boolean | null;
  /** Who need not pay before the orders: vouched for, or dropped. */
  vouched_for: string[];
  unconfirmed_bills: number;
  /** Lines that others offer to hand on to the viewer. */
  offered_lines: number;
  portions: number;
  portions_done: number;
  shares_waiting: number;
}

/** What the books say of a buy, for those who may know: who still owes, what the viewer owes, who gets money back. */
export interface BuyMoney {
  readonly unpaid: number;
  readonly myOpenMinor: number;
  readonly refundsWaiting: number;
}

/** The facts as `nextStep` takes them, for one viewer. */
export function nextFacts(
  row: BuyFactsRow,
  money: BuyMoney,
  viewer: { organises: boolean; helps: boolean; treasurer: boolean },
): NextFacts {
  return {
    state: row.state,
    frozen: row.state === 'open' && row.frozen_at !== null,
    lines: row.lines,
    unpaid: money.unpaid,
    overLimit: row.over_limit,
    unconfirmedBills: row.unconfirmed_bills,
    targetsMade: row.target_version > 0,
    portions: row.portions,
    portionsDone: row.portions_done,
    sharesWaiting: row.shares_waiting,
    refundsWaiting: money.refundsWaiting,
    viewer: {
      ...viewer,
      pledged: row.mine_mg > 0,
      owes: money.myOpenMinor > 0,
      mustAgree: row.must_agree ?? false,
      collected: row.collected ?? false,
    },
  };
}
