/** Biometry files of invented people, for the tests of the import. */
import Papa from 'papaparse';
import { TEMPLATE_COLUMNS, type TemplateColumn } from '@/shared/contract';

export type CsvRow = Partial<Record<TemplateColumn, string>>;

export const GOOD_ROW: Record<TemplateColumn, string> = {
  record_number: 'R-1',
  family_name: 'Invented',
  given_name: 'Ada',
  birth_date: '1950-04-03',
  sex: 'female',
  side: 'right',
  measured_at: '2026-02-20',
  method: 'optical',
  device: 'Biometer A',
  axial_length_mm: '23.51',
  axial_length_sd_mm: '0.02',
  flat_k_d: '43.25',
  flat_axis_deg: '175',
  steep_k_d: '44.10',
  steep_axis_deg: '85',
  keratometric_index: '1.3375',
  flat_radius_mm: '',
  steep_radius_mm: '',
  acd_mm: '3.12',
  acd_from: 'epithelium',
  lens_thickness_mm: '4.55',
  corneal_thickness_um: '545',
  white_to_white_mm: '11.9',
  pupil_mm: '3.4',
  operator: 'Ola Operator',
  remarks: '',
};

/** A file with the template's header and these rows, each the good row with its changes. */
export function csvOf(rows: readonly CsvRow[], { delimiter = ',', newline = '\r\n' } = {}): string {
  const records = rows.map((row) => TEMPLATE_COLUMNS.map((column) => row[column] ?? GOOD_ROW[column]));
  return Papa.unparse([[...TEMPLATE_COLUMNS], ...records], { delimiter, newline }) + newline;
}

/** Rows of as many invented patients as needed, two eyes each; `count` rows. */
export function manyRows(count: number, prefix = 'M'): CsvRow[] {
  return Array.from({ length: count }, (_row, index) => ({
    record_number: `${prefix}-${Math.floor(index / 2)}`,
    family_name: `Family${Math.floor(index / 2)}`,
    given_name: `Given${Math.floor(index / 2) % 97}`,
    side: index % 2 === 0 ? 'right' : 'left',
    axial_length_mm: (22 + (index % 400) / 100).toFixed(2),
    flat_k_d: (42 + (index % 170) / 100).toFixed(2),
    steep_k_d: (43.8 + (index % 130) / 100).toFixed(2),
  }));
}
