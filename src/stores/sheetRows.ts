import type { SheetPledge } from '#shared/domain/buys/sheetTerms.ts';
import type { LineTotal, PledgeChange, SheetReply } from '#shared/schemas/sheet.ts';

export type Cell = { wantedMg: number; upToMg: number | null; version: number; at: string };

/** One person on the sheet, their pledges by line. */
export type Row = {
  membershipId: string;
  name: string;
  guest: boolean;
  cells: Readonly<Record<string, Cell>>;
};

export type Rows = ReadonlyMap<string, Row>;
export type Wish = { wantedMg: number; upToMg: number | null };
export type Wishes = Readonly<Record<string, Wish>>;

export const emptyCell: Cell = { wantedMg: 0, upToMg: null, version: 0, at: '' };

/** The key of one cell among pending changes, problems and glows. */
export const cellKey = (membershipId: string, lineId: string) => `${membershipId} ${lineId}`;

/** Rows of a whole sheet. */
export function rowsOf(sheet: SheetReply): Rows {
  return new Map(
    sheet.members.map(({ pledges, ...person }) => {
      const cells: Record<string, Cell> = {};
      for (const [place, wantedMg, upToMg, version, atMs] of pledges) {
        const line = sheet.terms.lines[place];
        if (line) cells[line.id] = { wantedMg, upToMg, version, at: new Date(atMs).toISOString() };
      }
      return [person.membershipId, { ...person, cells }];
    }),
  );
}

/** Rows with one pledge changed; the others stay the same objects, so that only one row is drawn again. */
export function withPledge(rows: Rows, change: PledgeChange): Rows {
  const { membershipId, name, guest, lineId, wantedMg, upToMg, version, at } = change;
  const row = rows.get(membershipId);
  const known = row?.cells[lineId];
  if (known && known.version >= version) return rows;
  const cells = { ...row?.cells, [lineId]: { wantedMg, upToMg, version, at } };
  return new Map(rows).set(membershipId, { membershipId, name, guest, cells });
}

/** Stands for everybody whose single pledges the club doesn't show. */
export const others = '~others';

/** All living pledges: those of the rows, with what is being saved in their place, and hidden ones as one person's. */
export function pledgesOf(rows: Rows, wishes: Wishes, totals: readonly LineTotal[]): SheetPledge[] {
  const pledges: SheetPledge[] = [];
  const seen = new Set<string>();
  const add = (membershipId: string, lineId: string, cell: Cell) => {
    if (cell.wantedMg > 0 || cell.upToMg) pledges.push({ membershipId, lineId, ...cell });
  };
  for (const { membershipId, cells } of rows.values()) {
    for (const [lineId, cell] of Object.entries(cells)) {
      const key = cellKey(membershipId, lineId);
      seen.add(key);
      add(membershipId, lineId, { ...cell, ...wishes[key] });
    }
  }
  const now = new Date().toISOString();
  for (const [key, wish] of Object.entries(wishes)) {
    const [membershipId = '', lineId = ''] = key.split(' ');
    if (!seen.has(key)) add(membershipId, lineId, { ...wish, version: 0, at: now });
  }
  for (const { lineId, wantedMg, roomMg } of totals) {
    const own = pledges.filter((pledge) => pledge.lineId === lineId);
    const wanted = own.reduce((sum, pledge) => sum + pledge.wantedMg, 0);
    const rest = Math.max(0, wantedMg - wanted);
    const upToMg = roomMg > 0 ? rest + roomMg : null;
    add(others, lineId, { wantedMg: rest, upToMg, version: 0, at: '1970-01-01T00:00:00.000Z' });
  }
  return pledges;
}

/** A record without one key. */
export const without = <T>(record: Readonly<Record<string, T>>, key: string): Record<string, T> =>
  Object.fromEntries(Object.entries(record).filter(([name]) => name !== key));
