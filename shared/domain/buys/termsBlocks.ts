/** What `termsBlocks` looks at; instants in ms. */
export interface DraftedTerms {
  readonly nowMs: number;
  readonly closesAtMs: number | null;
  readonly splitsAtMs: number | null;
  readonly splitEndsAtMs: number | null;
  readonly minimumKind: 'none' | 'mass' | 'value' | 'members';
  readonly minimumAmount: number;
  readonly leftOverPayer: 'members' | 'shelf';
  readonly shelfLimitMinor: number;
  readonly clubShelfLimitMinor: number;
  readonly lines: readonly {
    readonly id: string;
    readonly name: string;
    readonly livingOffers: number;
    readonly refusal: string | null;
  }[];
}

/** What is wrong with a buy's dates, by field; `nowMs` null: the closing may lie in the past. */
export function dateErrors(
  dates: Pick<DraftedTerms, 'closesAtMs' | 'splitsAtMs' | 'splitEndsAtMs'>,
  nowMs: number | null,
): Record<string, string> {
  const errors: Record<string, string> = {};
  const { closesAtMs, splitsAtMs, splitEndsAtMs } = dates;
  if (closesAtMs === null) errors.closesAt = 'Choose when the buy closes.';
  else if (nowMs !== null && closesAtMs <= nowMs) errors.closesAt = 'This time has passed.';
  if (splitsAtMs === null) errors.splitsAt = 'Choose the split day.';
  else if (closesAtMs !== null && splitsAtMs <= closesAtMs)
    errors.splitsAt = 'The split day comes after the closing.';
  if (splitEndsAtMs !== null && splitsAtMs !== null && splitEndsAtMs <= splitsAtMs)
    errors.splitEndsAt = 'The end comes after the start.';
  return errors;
}

/** What keeps a draft from opening, by field: `closesAt`, `lines`, `lines.ID.offers` and the like. */
export function termsBlocks(terms: DraftedTerms): Record<string, string> {
  const errors = dateErrors(terms, terms.nowMs);
  if (terms.lines.length === 0) errors.lines = 'Add at least one line.';
  for (const { id, name, livingOffers, refusal } of terms.lines) {
    if (refusal !== null) errors[`lines.${id}.saltId`] = refusal;
    else if (livingOffers === 0)
      errors[`lines.${id}.offers`] = `${name} has no offer to be bought from.`;
  }
  if (terms.minimumKind !== 'none' && terms.minimumAmount === 0)
    errors.minimumAmount = 'Say how much the minimum is, or choose none.';
  if (terms.leftOverPayer === 'shelf' && terms.shelfLimitMinor > terms.clubShelfLimitMinor)
    errors.shelfLimitMinor = 'This is more than the treasurer lets a buy charge the shelf.';
  return errors;
}
