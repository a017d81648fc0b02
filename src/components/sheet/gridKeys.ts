/** Where the focus is in a sheet: row 0 is one's own, column 0 the name. */
export type Spot = { row: number; column: number };

/** The spot a key leads to, or null when the key isn't one that moves. */
export function moveSpot(
  { row, column }: Spot,
  event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey'>,
  size: { rows: number; columns: number },
): Spot | null {
  const last = { row: size.rows - 1, column: size.columns - 1 };
  const far = event.ctrlKey || event.metaKey;
  switch (event.key) {
    case 'ArrowUp':
      return { row: far ? 0 : Math.max(0, row - 1), column };
    case 'ArrowDown':
      return { row: far ? last.row : Math.min(last.row, row + 1), column };
    case 'ArrowLeft':
      return { row, column: far ? 0 : Math.max(0, column - 1) };
    case 'ArrowRight':
      return { row, column: far ? last.column : Math.min(last.column, column + 1) };
    case 'Home':
      return { row: far ? 0 : row, column: 0 };
    case 'End':
      return { row: far ? last.row : row, column: last.column };
    case 'PageUp':
      return { row: Math.max(0, row - 10), column };
    case 'PageDown':
      return { row: Math.min(last.row, row + 10), column };
    default:
      return null;
  }
}

/** Whether a key begins a new value in a cell: a digit, a mark or a sign, nothing held with it. */
export function beginsValue(event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'altKey'>) {
  return !event.ctrlKey && !event.metaKey && !event.altKey && /^[\d.,]$/.test(event.key);
}
