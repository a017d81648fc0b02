import { CsvError, parse } from 'csv-parse/sync';
import { invalid } from '../../problem.ts';
import { decodeTable } from '../../uploads/sniffType.ts';

/** A table as text: its first row as headers, each further row with the line it begins in. */
export interface Table {
  readonly headers: string[];
  readonly delimiter: ',' | ';' | 'tab';
  readonly rows: readonly { line: number; cells: string[] }[];
}

interface Parsed {
  record: string[];
  info: { lines: number };
}

const mostRows = 2000;
const mostColumns = 200;
const delimiters = [';', ',', '\t'] as const;

function parseBy(text: string, delimiter: string, to?: number): Parsed[] {
  return parse(text, {
    delimiter,
    bom: true,
    record_delimiter: ['\r\n', '\n', '\r'],
    info: true,
    trim: true,
    relax_column_count: true,
    skip_empty_lines: true,
    skip_records_with_empty_values: true,
    ...(to ? { to } : {}),
  }) as unknown as Parsed[];
}

/** The delimiter by which most of the first rows have as many cells as the first; the more cells the better. */
function findDelimiter(text: string): (typeof delimiters)[number] {
  let best: (typeof delimiters)[number] = ',';
  let most = 0;
  for (const delimiter of delimiters) {
    let sample: Parsed[];
    try {
      sample = parseBy(text, delimiter, 30);
    } catch {
      continue;
    }
    const width = sample[0]?.record.length ?? 0;
    const alike = sample.filter(({ record }) => record.length === width).length;
    const score = width < 2 ? 0 : (alike / sample.length) * 1000 + width;
    if (score > most) {
      best = delimiter;
      most = score;
    }
  }
  return best;
}

/**
 * Reads a CSV file whatever its delimiter (comma, semicolon, tab), line ends and encoding.
 * @throws DomainProblem 422 at `file`, saying in which line it breaks
 */
export function readTable(bytes: Buffer): Table {
  const text = decodeTable(bytes);
  if (text === null)
    throw invalid({ file: 'This is not a text table. Save it as CSV and try again.' });
  const delimiter = findDelimiter(text);
  let parsed: Parsed[];
  try {
    parsed = parseBy(text, delimiter);
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const line = typeof error.lines === 'number' ? ` near line ${error.lines}` : '';
    throw invalid({
      file: `The table breaks${line}: a quotation mark is not closed or stands alone.`,
    });
  }
  const [first, ...rest] = parsed;
  if (!first) throw invalid({ file: 'The file is empty.' });
  if (first.record.length < 2) {
    throw invalid({
      file: 'Only one column is found. Columns are parted by comma, semicolon or tab.',
    });
  }
  if (rest.length === 0) throw invalid({ file: 'There is only a header, no row below it.' });
  if (rest.length > mostRows || first.record.length > mostColumns) {
    throw invalid({ file: `At most ${mostRows} rows and ${mostColumns} columns.` });
  }
  let line = first.info.lines + 1;
  return {
    headers: first.record,
    delimiter: delimiter === '\t' ? 'tab' : delimiter,
    rows: rest.map(({ record, info }) => {
      const row = { line: Math.min(line, info.lines), cells: record };
      line = info.lines + 1;
      return row;
    }),
  };
}
