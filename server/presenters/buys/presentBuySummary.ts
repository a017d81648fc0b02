import { nextStep } from '#shared/domain/buys/nextStep.ts';
import type { BuySummary } from '#shared/schemas/buys.ts';
import type { ClubStanding } from '../../policies/actor.ts';
import { nextFacts, type BuyFactsRow, type BuyMoney } from './rows.ts';

/** An instant as the wire has it. */
export const instant = (at: Date | null): string | null => at?.toISOString() ?? null;

/** One buy of the list, from this viewer's side. */
export function presentBuySummary(
  row: BuyFactsRow,
  money: BuyMoney,
  actor: ClubStanding,
): BuySummary {
  return {
    id: row.id,
    name: row.name,
    state: row.state,
    frozen: row.state === 'open' && row.frozen_at !== null,
    opened: row.opened_at !== null,
    responsible: { membershipId: row.responsible_id, name: row.responsible_name },
    closesAt: instant(row.closes_at),
    frozenUntil: instant(row.frozen_until),
    splitsAt: instant(row.splits_at),
    place: row.place,
    lines: row.lines,
    members: row.members,
    pledgedMg: row.pledged_mg,
    mineMg: row.mine_mg,
    organises: row.organises,
    next: nextStep(
      nextFacts(row, money, {
        organises: row.organises,
        helps: false,
        treasurer: actor.roles.treasurer,
      }),
    ),
    createdAt: row.created_at.toISOString(),
  };
}
