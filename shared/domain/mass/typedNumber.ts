/** Digits of a number a person typed: `digits` read as an integer, over ten to the `places`. */
export type Decimal = { digits: bigint; places: number };

/** What a typed number can mean: one reading, or the decimal and the thousands reading. */
export type TypedNumber =
  | { kind: 'number'; value: Decimal; negative: boolean }
  | { kind: 'ambiguous'; decimal: Decimal; thousands: Decimal; negative: boolean }
  | { kind: 'empty' }
  | { kind: 'unreadable' };

const unreadable: TypedNumber = { kind: 'unreadable' };

function decimal(whole: string, fraction = ''): Decimal {
  return { digits: BigInt(whole + fraction || '0'), places: fraction.length };
}

/** Digits of `1.234.567` or `1 234`, when every group after the first has three. */
function ungroup(text: string, mark: string): string | null {
  const [first = '', ...groups] = text.split(mark);
  const ok = /^\d{1,3}$/.test(first) && groups.every((group) => /^\d{3}$/.test(group));
  return ok ? first + groups.join('') : null;
}

/**
 * Reads digits with a comma or point as decimal mark and comma, point, space or apostrophe between
 * thousands. A single mark before exactly three digits could be either: it is `ambiguous`.
 *
 * @param text without unit; full-width digits and exotic spaces are understood
 */
export function readTypedNumber(text: string): TypedNumber {
  const plain = text
    .normalize('NFKC')
    .replace(/[\u2018\u2019\u02bc]/g, "'")
    .trim();
  if (plain === '') return { kind: 'empty' };
  const signed = /^([+\u2212-]?)\s*(.*)$/su.exec(plain);
  const negative = signed?.[1] === '-' || signed?.[1] === '\u2212';
  const body = signed?.[2] ?? '';
  if (!/^[\d.,'\s]*\d[\d.,'\s]*$/.test(body)) return unreadable;

  const point = body.lastIndexOf('.');
  const comma = body.lastIndexOf(',');
  const spaced = /[\s']/.exec(body)?.[0];
  const done = (value: Decimal): TypedNumber => ({ kind: 'number', value, negative });

  if (point < 0 && comma < 0) {
    const digits = spaced ? ungroup(body, spaced) : body;
    return digits === null ? unreadable : done(decimal(digits));
  }
  const mark = point > comma ? '.' : ',';
  const at = Math.max(point, comma);
  const head = body.slice(0, at);
  const tail = body.slice(at + 1);
  const other = mark === '.' ? ',' : '.';
  const group = head.includes(other) ? other : spaced;

  if (head.includes(mark)) {
    // The same mark twice can only stand between thousands: 1,234,567.
    if (group !== undefined) return unreadable;
    const digits = ungroup(body, mark);
    return digits === null ? unreadable : done(decimal(digits));
  }
  if (!/^\d*$/.test(tail)) return unreadable;
  const whole = group === undefined ? head : ungroup(head, group);
  if (whole === null || !/^\d*$/.test(whole)) return unreadable;
  if (tail.length === 3 && group === undefined && whole !== '') {
    return {
      kind: 'ambiguous',
      decimal: decimal(whole, tail),
      thousands: decimal(whole + tail),
      negative,
    };
  }
  return done(decimal(whole, tail));
}

/** The decimal times a whole factor, or null when that isn't whole. */
export function timesWhole(value: Decimal, factor: bigint): bigint | null {
  const scale = 10n ** BigInt(value.places);
  const product = value.digits * factor;
  return product % scale === 0n ? product / scale : null;
}
