import { nextStep } from '#shared/domain/buys/nextStep.ts';
import { hasReached } from '#shared/domain/buys/states.ts';
import type { BuyHeader, BuyHelper, BuyPerson } from '#shared/schemas/buys.ts';
import type { BuyStanding } from '../../policies/actor.ts';
import { mayWithBuy } from './may.ts';
import { instant } from './presentBuySummary.ts';
import { nextFacts, type BuyFactsRow, type BuyMoney } from './rows.ts';

export interface BuyPeopleAndChanges {
  coOrganisers: BuyPerson[];
  helpers: BuyHelper[];
  changes: { terms_version: number; summary: string; at: Date; by: string | null }[];
  now: Date;
  money: BuyMoney;
}

/** A buy's head from this viewer's side. */
export function presentBuyHeader(
  row: BuyFactsRow,
  { coOrganisers, helpers, changes, now, money }: BuyPeopleAndChanges,
  actor: BuyStanding,
): BuyHeader {
  const { organises, helps, takesCash, takesPart } = actor.buy;
  const frozen = row.state === 'open' && row.frozen_at !== null;
  return {
    id: row.id,
    name: row.name,
    state: row.state,
    termsVersion: row.terms_version,
    sheetVersion: row.sheet_version,
    responsible: { membershipId: row.responsible_id, name: row.responsible_name },
    offeredTo: row.offered_to_id
      ? { membershipId: row.offered_to_id, name: row.offered_to_name ?? '' }
      : null,
    coOrganisers,
    helpers,
    minimumKind: row.minimum_kind,
    minimumAmount: row.minimum_amount,
    priceLimitPermille: row.price_limit_permille,
    dueDays: row.due_days,
    dueAt: instant(row.due_at),
    closesAt: instant(row.closes_at),
    frozenAt: instant(row.frozen_at),
    frozenUntil: instant(row.frozen_until),
    splitsAt: instant(row.splits_at),
    splitEndsAt: instant(row.split_ends_at),
    place: row.place,
    pickupRules: row.pickup_rules,
    note: row.note,
    loweringFreezeHours: row.lowering_freeze_hours,
    leftOverPayer: row.left_over_payer,
    shelfLimitMinor: row.shelf_limit_minor,
    clubShelfLimitMinor: row.club_shelf_limit_minor,
    spreadMaxPermille: row.spread_max_permille,
    bandPermille: row.band_permille,
    unclaimedDays: row.unclaimed_days,
    targetVersion: row.target_version,
    copiedFrom: row.copied_from_id
      ? { id: row.copied_from_id, name: row.copied_from_name ?? '' }
      : null,
    reopenReason: row.reopen_reason,
    cancelReason: row.cancel_reason,
    openedAt: instant(row.opened_at),
    lockedAt: instant(row.locked_at),
    orderedAt: instant(row.ordered_at),
    arrivedAt: instant(row.arrived_at),
    splittingAt: instant(row.splitting_at),
    pickupAt: instant(row.pickup_at),
    settledAt: instant(row.settled_at),
    cancelledAt: instant(row.cancelled_at),
    createdAt: row.created_at.toISOString(),
    counts: { lines: row.lines, members: row.members, pledgedMg: row.pledged_mg },
    mine: {
      membershipId: actor.membershipId,
      organises,
      helps,
      takesCash,
      takesPart,
      wantedMg: row.mine_mg,
      offeredLines: row.offered_lines,
      owedMinor: hasReached(row.state, 'locked') ? money.myOpenMinor : null,
    },
    changes: changes.map((change) => ({
      termsVersion: change.terms_version,
      summary: change.summary,
      at: change.at.toISOString(),
      by: change.by,
    })),
    may: mayWithBuy(actor, {
      state: row.state,
      offeredToId: row.offered_to_id,
      frozen,
      opened: row.opened_at !== null,
    }),
    next: nextStep(nextFacts(row, money, { organises, helps, treasurer: actor.roles.treasurer })),
    now: now.toISOString(),
  };
}
