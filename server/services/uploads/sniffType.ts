import { parse } from 'csv-parse/sync';
import { fileTypeFromBuffer } from 'file-type';

/** Types of files that are taken, told by their content. */
export type TakenType = 'image/jpeg' | 'image/png' | 'image/webp' | 'application/pdf' | 'text/csv';

const byContent = new Set<string>(['image/jpeg', 'image/png', 'image/webp', 'application/pdf']);
const sampleBytes = 64 * 1024;

/** Text of a table file: UTF-8 or UTF-16 with a mark, else UTF-8, else Windows-1252; null when it is no text. */
export function decodeTable(bytes: Buffer): string | null {
  const encodings =
    bytes[0] === 0xff && bytes[1] === 0xfe ? ['utf-16le'] : ['utf-8', 'windows-1252'];
  for (const encoding of encodings) {
    try {
      const text = new TextDecoder(encoding, { fatal: true }).decode(bytes);
      // eslint-disable-next-line no-control-regex -- control characters are what tells data from text
      return /[\u0000-\u0008\u000e-\u001f\u007f]/.test(text) ? null : text;
    } catch {
      // Not this encoding: try the next.
    }
  }
  return null;
}

/** Whether text is a table: two rows or more, each with the same number of columns, two or more, by one delimiter. */
function looksLikeTable(text: string): boolean {
  const whole = text.length <= sampleBytes;
  const sample = whole ? text : text.slice(0, text.lastIndexOf('\n', sampleBytes));
  if (/^\s*[<{[]/.test(sample)) return false;
  return [',', ';', '\t'].some((delimiter) => {
    try {
      const rows = parse(sample, {
        delimiter,
        skip_empty_lines: true,
        relax_quotes: false,
        to: 50,
      }) as string[][];
      return rows.length >= 2 && (rows[0]?.length ?? 0) >= 2;
    } catch {
      return false;
    }
  });
}

/** The type of a file by what is in it, whatever it is called; null for anything that is not taken. */
export async function sniffType(bytes: Buffer): Promise<TakenType | null> {
  // A file that breaks off in its own header is of no type.
  const found = await fileTypeFromBuffer(bytes).catch(() => null);
  if (found === null) return null;
  if (found) return byContent.has(found.mime) ? (found.mime as TakenType) : null;
  const text = decodeTable(bytes);
  return text !== null && looksLikeTable(text) ? 'text/csv' : null;
}
