/** The header of a CSV file against the columns that it must have, in any order. */
import type { FieldError } from '@/shared/contract';
import { firstRecord, type Delimiter } from '@/server/csv/records';

export interface CsvHeader<Column extends string> {
  delimiter: Delimiter;
  /** Line of the file. */
  line: number;
  /** Place of each column in a record. */
  places: Readonly<Record<Column, number>>;
  width: number;
}

const DELIMITERS: readonly Delimiter[] = [',', ';', '\t'];
export const DELIMITER_NAMES: Readonly<Record<Delimiter, string>> = {
  ',': 'comma',
  ';': 'semicolon',
  '\t': 'tab',
};

/** Header of the text, or everything that is wrong with it. */
export function readHeader<Column extends string>(
  text: string,
  columns: readonly Column[],
): CsvHeader<Column> | { problems: FieldError[] } {
  const { record, delimiter } = likeliestHeader(text, columns);
  if (!record) return { problems: [fileError('empty', 'The file is empty')] };
  const names = record.fields.map((name) => name.trim().toLowerCase());
  const problems = problemsOf(names, columns);
  if (problems.length > 0) return { problems };
  return {
    delimiter,
    line: record.line,
    places: Object.fromEntries(columns.map((column) => [column, names.indexOf(column)])) as Record<
      Column,
      number
    >,
    width: names.length,
  };
}

export function fileError(code: string, message: string, path = 'file'): FieldError {
  return { path, code, message };
}

/** The delimiter is the one that makes the most known columns out of the first line. */
function likeliestHeader(text: string, columns: readonly string[]) {
  const readings = DELIMITERS.map((delimiter) => {
    const record = firstRecord(text, delimiter);
    const known = record?.fields.filter((name) => columns.includes(name.trim().toLowerCase())).length ?? 0;
    return { delimiter, record, known };
  });
  return readings.reduce((best, reading) => (reading.known > best.known ? reading : best));
}

function problemsOf(names: readonly string[], columns: readonly string[]): FieldError[] {
  const problems: FieldError[] = [];
  const missing = columns.filter((column) => !names.includes(column));
  if (missing.length === columns.length) {
    return [
      fileError(
        'wrong-header',
        `The first line does not name the columns of the template: ${columns.join(', ')}`,
      ),
    ];
  }
  for (const column of missing)
    problems.push(fileError('missing-column', `The column ${column} is missing`, column));
  for (const [index, name] of names.entries()) {
    if (name === '') problems.push(fileError('unknown-column', `Column ${index + 1} has no name`));
    else if (!columns.includes(name))
      problems.push(
        fileError(
          'unknown-column',
          `The column "${name.slice(0, 60)}" is not in the template`,
          name.slice(0, 60),
        ),
      );
    else if (names.indexOf(name) !== index)
      problems.push(fileError('duplicate-column', `The column ${name} stands there twice`, name));
  }
  return problems;
}
