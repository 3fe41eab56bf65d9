/**
 * An uploaded biometry file as records of the template's columns, or why it is no such file. What is wrong with
 * single rows is found later, in `check-rows.ts`.
 */
import { IMPORT_MAX_ROWS, TEMPLATE_COLUMNS, type FieldError, type TemplateColumn } from '@/shared/contract';
import { decodeText } from '@/server/csv/decode';
import { DELIMITER_NAMES, fileError, readHeader, type CsvHeader } from '@/server/csv/header';
import { BrokenQuoteError, recordBatches, type CsvRecord } from '@/server/csv/records';

export type BiometryHeader = CsvHeader<TemplateColumn>;

export interface BiometryFile {
  header: BiometryHeader;
  delimiterName: string;
  encoding: string;
  /** Upper bound of the number of rows, known before they are read. */
  lines: number;
  /** Rows in batches. Throws {@link FileRefusedError} when the rest of the file cannot be trusted. */
  batches(): Generator<CsvRecord[]>;
}

/** Found while reading: nothing of the file may be used. */
export class FileRefusedError extends Error {
  constructor(readonly problem: FieldError) {
    super(problem.message);
    this.name = 'FileRefusedError';
  }
}

export function readFile(bytes: Buffer): { file: BiometryFile } | { problems: FieldError[] } {
  const decoded = decodeText(bytes);
  if ('problem' in decoded) return { problems: [fileError(decoded.problem.code, decoded.problem.message)] };
  const { text, hasByteOrderMark } = decoded;
  const header = readHeader(text, TEMPLATE_COLUMNS);
  if ('problems' in header) return header;
  return {
    file: {
      header,
      delimiterName: DELIMITER_NAMES[header.delimiter],
      encoding: hasByteOrderMark ? 'UTF-8 with BOM' : 'UTF-8',
      lines: countLines(text),
      batches: () => rowBatches(text, header),
    },
  };
}

function* rowBatches(text: string, header: BiometryHeader): Generator<CsvRecord[]> {
  let count = 0;
  try {
    for (const batch of recordBatches(text, header.delimiter)) {
      const rows = batch.filter(({ line }) => line > header.line);
      count += rows.length;
      if (count > IMPORT_MAX_ROWS) throw tooManyRows();
      yield rows;
    }
  } catch (error) {
    throw error instanceof BrokenQuoteError ? brokenQuote(error.line) : error;
  }
  if (count === 0) throw noRows();
}

const tooManyRows = (): FileRefusedError =>
  refusal(
    'too-many-rows',
    `The file has more than ${IMPORT_MAX_ROWS.toLocaleString('en')} rows: split it into smaller files`,
  );
const noRows = (): FileRefusedError => refusal('no-rows', 'The file has a header and no rows below it');
const brokenQuote = (line: number): FileRefusedError =>
  refusal(
    'broken-quote',
    `A quoted field that begins in line ${line} does not end properly: the file is cut off, or a quote inside a field is not doubled`,
  );

function refusal(code: string, message: string): FileRefusedError {
  return new FileRefusedError(fileError(code, message));
}

function countLines(text: string): number {
  let count = 0;
  for (let at = text.indexOf('\n'); at !== -1; at = text.indexOf('\n', at + 1)) count += 1;
  return count;
}
