/** All rows of an uploaded file, read in small portions between which the process serves others. */
import { MEASUREMENT_FIELDS, type FieldError } from '@/shared/contract';
import { breathe } from './breathe';
import { FileRefusedError, readFile, type BiometryFile, type BiometryHeader } from './read-file';
import { readRow, type RowReading } from './read-row';

export interface Progress {
  done: number;
  total: number;
}
export type OnProgress = (progress: Progress) => void;

export interface ReadRows {
  header: BiometryHeader;
  readings: RowReading[];
  /** `semicolon, decimal comma, UTF-8 with BOM`. */
  readAs: string;
}

export async function readRows(
  bytes: Buffer,
  today: string,
  onProgress: OnProgress,
): Promise<ReadRows | { problems: FieldError[] }> {
  const opened = readFile(bytes);
  if ('problems' in opened) return opened;
  try {
    return await readBatches(opened.file, today, onProgress);
  } catch (error) {
    if (error instanceof FileRefusedError) return { problems: [error.problem] };
    throw error;
  }
}

async function readBatches(file: BiometryFile, today: string, onProgress: OnProgress): Promise<ReadRows> {
  const { header, lines } = file;
  const readings: RowReading[] = [];
  const marks = { comma: false, point: false };
  for (const batch of file.batches()) {
    for (const record of batch) {
      readings.push(readRow({ header, today }, record));
      noteDecimalMarks(marks, header, record.fields);
    }
    onProgress({ done: readings.length, total: Math.max(lines, readings.length) });
    await breathe();
  }
  return { header, readings, readAs: describeReading(file, marks) };
}

interface DecimalMarks {
  comma: boolean;
  point: boolean;
}

function noteDecimalMarks(marks: DecimalMarks, { places }: BiometryHeader, fields: readonly string[]): void {
  for (const { column } of MEASUREMENT_FIELDS) {
    const field = fields[places[column]];
    if (field === undefined || field === '') continue;
    marks.comma ||= field.includes(',');
    marks.point ||= field.includes('.');
  }
}

function describeReading({ delimiterName, encoding }: BiometryFile, { comma, point }: DecimalMarks): string {
  const mark = comma ? (point ? 'decimal comma and point' : 'decimal comma') : 'decimal point';
  return `${delimiterName}, ${mark}, ${encoding}`;
}
