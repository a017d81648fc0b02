import type { AuditEntry } from '#shared/schemas/audit.ts';

type Content = Record<string, unknown> | null;

/** An audit line with the names that its ids stand for. */
export interface AuditRow {
  id: number;
  at: Date;
  actor_id: string | null;
  actor_name: string;
  action: string;
  subject_type: string;
  subject_name: string | null;
  before: Content;
  after: Content;
  buy_id: string | null;
  buy_name: string | null;
  own_buy: boolean | null;
}

/** Members' money stands under the key `private`: lifted out for who may see it, dropped for who may not. */
function readable(content: Content, seesMoney: boolean): Content {
  if (!content) return null;
  const { private: money, ...rest } = content;
  return seesMoney && typeof money === 'object' && money !== null ? { ...rest, ...money } : rest;
}

const hidesMoney = (content: Content) => content !== null && 'private' in content;

/** One line of the log for one reader. */
export function presentAuditEntry(row: AuditRow, seesMoney: boolean): AuditEntry {
  return {
    id: row.id,
    at: row.at.toISOString(),
    actorId: row.actor_id,
    actorName: row.actor_name,
    action: row.action,
    subjectType: row.subject_type,
    subjectName: row.subject_name,
    buy: row.buy_id && row.buy_name !== null ? { id: row.buy_id, name: row.buy_name } : null,
    before: readable(row.before, seesMoney),
    after: readable(row.after, seesMoney),
    moneyHidden: !seesMoney && (hidesMoney(row.before) || hidesMoney(row.after)),
  };
}
