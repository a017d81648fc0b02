// Crockford's base 32: no I, L, O, U, so that a code read aloud or from paper is not mistaken.
const alphabet = '0123456789ABCDEFGHJKMNPQRSTVWXYZ';
const passBytes = 10;
const passLength = (passBytes * 8) / 5;

function valueOf(mark: string): number {
  return alphabet.indexOf(mark);
}

/** Luhn's check character over base 32 ("Luhn mod N"): finds every single wrong mark and most swaps of neighbours. */
function checkMark(marks: string): string {
  let factor = 2;
  let sum = 0;
  for (const mark of [...marks].reverse()) {
    const product = valueOf(mark) * factor;
    sum += Math.floor(product / 32) + (product % 32);
    factor = factor === 2 ? 1 : 2;
  }
  return alphabet.charAt((32 - (sum % 32)) % 32);
}

/**
 * A pass as it is printed: 80 bits in base 32 and a check character, in groups of four.
 *
 * @param bytes ten bytes that nobody can guess
 */
export function writePass(bytes: Uint8Array): string {
  if (bytes.length !== passBytes) throw new RangeError('bytes must be ten');
  let value = 0n;
  for (const byte of bytes) value = value * 256n + BigInt(byte);
  let marks = '';
  for (let index = 0; index < passLength; index += 1) {
    marks = alphabet.charAt(Number(value % 32n)) + marks;
    value /= 32n;
  }
  return (marks + checkMark(marks)).replace(/.{4}(?=.)/g, '$&-');
}

/** A typed or scanned pass as `writePass` writes it, or null when it was mistyped. Lower case, gaps, O for 0, I and L for 1 are read. */
export function readPass(text: string): string | null {
  const marks = text.toUpperCase().replace(/[\s-]/g, '').replace(/O/g, '0').replace(/[IL]/g, '1');
  if (marks.length !== passLength + 1 || [...marks].some((mark) => valueOf(mark) < 0)) return null;
  if (checkMark(marks.slice(0, -1)) !== marks.at(-1)) return null;
  return marks.replace(/.{4}(?=.)/g, '$&-');
}
