/** The one way in which CSV leaves the house: formulas made harmless, CRLF line ends, UTF-8. */
import Papa from 'papaparse';
import { FORMULA_LIKE } from '@/server/csv/formula-text';

export interface CsvTable {
  columns: readonly string[];
  rows: readonly (readonly (string | number | null)[])[];
}

export function toCsv({ columns, rows }: CsvTable): Buffer {
  const records = [[...columns], ...rows.map((row) => [...row])];
  const text = Papa.unparse(records, { delimiter: ',', newline: '\r\n', escapeFormulae: FORMULA_LIKE });
  return Buffer.from(`${text}\r\n`);
}
