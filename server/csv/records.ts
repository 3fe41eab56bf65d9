/**
 * Text of a CSV file as records, in batches, so that the caller can let others have a turn in between.
 * The parsing itself is papaparse's.
 */
import Papa, { type ParseError } from 'papaparse';

export type Delimiter = ',' | ';' | '\t';

export interface CsvRecord {
  /** Line of the file on which the record begins; the first line is 1. */
  line: number;
  fields: string[];
}

/** A quoted field that never ends, or goes on after its end: from here on nothing can be trusted. */
export class BrokenQuoteError extends Error {
  constructor(readonly line: number) {
    super(`Broken quote in line ${line}`);
    this.name = 'BrokenQuoteError';
  }
}

interface Parsed {
  data: string[][];
  errors: ParseError[];
  meta: { cursor: number };
}

const SLICE_LENGTH = 128 * 1024;
const HEADER_MAX_LENGTH = 64 * 1024;
const BLANK_LINES = /^(?:[^\S\n]*\n)*/;

/** Records without the blank ones, some hundred at a time. Throws {@link BrokenQuoteError}. */
export function* recordBatches(text: string, delimiter: Delimiter): Generator<CsvRecord[]> {
  let position = 0;
  let length = SLICE_LENGTH;
  let line = 1;
  while (position < text.length) {
    const isLast = position + length >= text.length;
    const { data, errors, meta } = parseSlice(text.slice(position, position + length), delimiter, isLast);
    const batch: CsvRecord[] = [];
    const broken = errors.find((error) => error.row !== undefined && (isLast || error.row < data.length));
    for (const [index, fields] of data.entries()) {
      if (broken?.row === index) throw new BrokenQuoteError(line);
      if (!isBlank(fields)) batch.push({ line, fields });
      line += 1 + lineFeedsIn(fields);
    }
    if (broken) throw new BrokenQuoteError(line);
    if (batch.length > 0) yield batch;
    if (isLast) return;
    // A record longer than the slice: look further.
    length = meta.cursor === 0 ? length * 2 : SLICE_LENGTH;
    position += meta.cursor;
  }
}

/** The first record that is not blank. */
export function firstRecord(text: string, delimiter: Delimiter): CsvRecord | undefined {
  const blankLines = BLANK_LINES.exec(text)?.[0] ?? '';
  const parser = new Papa.Parser({ delimiter, newline: '\n', preview: 1 });
  const { data } = parser.parse(text.slice(blankLines.length, HEADER_MAX_LENGTH), 0, false) as Parsed;
  const fields = data[0];
  if (fields === undefined || isBlank(fields)) return undefined;
  return { line: 1 + lineFeedsIn([blankLines]), fields };
}

function parseSlice(slice: string, delimiter: Delimiter, isLast: boolean): Parsed {
  const parser = new Papa.Parser({ delimiter, newline: '\n' });
  return parser.parse(slice, 0, !isLast) as Parsed;
}

function isBlank(fields: readonly string[]): boolean {
  return (fields[0] === '' || fields[0]?.trim() === '') && fields.every((field) => field.trim() === '');
}

/** Only quoted fields can hold them. */
function lineFeedsIn(fields: readonly string[]): number {
  let count = 0;
  for (const field of fields) {
    for (let at = field.indexOf('\n'); at !== -1; at = field.indexOf('\n', at + 1)) count += 1;
  }
  return count;
}
