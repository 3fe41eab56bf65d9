/**
 * Files of biometry for the demonstration, dated back from the day they are made so that they do not age: one
 * that fills the new database, and one for trying the upload, with rows that are new, already there and refused.
 */
import { randomFromSeed } from '@/formulas';
import { TEMPLATE_COLUMNS } from '@/shared/contract';
import { toCsv } from '@/server/reports/csv';
import { demoCohort } from './demo-cohort';
import type { DemoCase } from './demo-cases';
import { templateRow } from './demo-eye';
import type { DemoEye, DemoPerson, TemplateRow } from './demo-eye';

const inColumns = (row: TemplateRow): string[] => TEMPLATE_COLUMNS.map((column) => row[column]);
const csvOf = (rows: readonly TemplateRow[]): Buffer =>
  toCsv({ columns: TEMPLATE_COLUMNS, rows: rows.map(inColumns) });

function rowsOf({ person, right, left }: DemoCase, today: string): TemplateRow[] {
  return [
    ...(right ? [templateRow(person, 'right', { eye: right, today })] : []),
    ...(left ? [templateRow(person, 'left', { eye: left, today })] : []),
  ];
}

/** What the new database of the demonstration is filled with. */
export const seedBiometryCsv = (today: string): Buffer =>
  csvOf(demoCohort().flatMap((one) => rowsOf(one, today)));

const NEWCOMERS: readonly (readonly [
  record: string,
  family: string,
  given: string,
  born: string,
  sex: DemoPerson['sex'],
])[] = [
  ['D-0301', 'Samphire', 'Nadia', '1954-04-17', 'female'],
  ['D-0302', 'Tidewell', 'Oskar', '1949-09-02', 'male'],
  ['D-0303', 'Upshore', 'Malika', '1958-01-30', 'female'],
  ['D-0304', 'Vanewick', 'Henrik', '1945-12-12', 'male'],
  ['D-0305', 'Weirside', 'Paola', '1962-07-07', 'female'],
  ['D-0306', 'Yarrowby', 'Samir', '1951-03-25', 'male'],
  ['D-0307', 'Zephyrly', 'Greta', '1947-08-19', 'female'],
  ['D-0308', 'Ashgrove', 'Niko', '1956-10-10', 'male'],
];

/** The file offered on the import page. The same day gives the same bytes. */
export function demoBiometryCsv(today: string): Buffer {
  const newcomers = NEWCOMERS.flatMap(([record, family, given, born, sex], index) => {
    const eyes = eyesOf(index);
    return rowsOf({ story: '', person: { record, family, given, born, sex }, ...eyes }, today);
  });
  return csvOf([...asRadii(newcomers), ...knownRows(today), ...faultyRows(newcomers)]);
}

function eyesOf(index: number): { right: DemoEye; left: DemoEye } {
  const random = randomFromSeed(7000 + index);
  const base = {
    axialLengthMm: 22.6 + 2.2 * random.uniform(),
    flatKD: 42.4 + 2 * random.uniform(),
    acdMm: 2.8 + 0.6 * random.uniform(),
    lensThicknessMm: 4.2 + 0.6 * random.uniform(),
    cornealThicknessUm: 520 + Math.round(60 * random.uniform()),
    whiteToWhiteMm: 11.5 + 0.6 * random.uniform(),
    daysAgo: 1,
  };
  const right = {
    ...base,
    steepKD: base.flatKD + 0.5 + 1.2 * random.uniform(),
    steepAxisDeg: 80 + Math.round(20 * random.uniform()),
  };
  const left = {
    ...right,
    axialLengthMm: base.axialLengthMm + 0.09,
    flatKD: right.flatKD + 0.11,
    steepKD: right.steepKD + 0.08,
    steepAxisDeg: 180 - right.steepAxisDeg,
  };
  return { right, left };
}

/** Every third row carries radii instead of dioptres: the template takes either. */
function asRadii(rows: readonly TemplateRow[]): TemplateRow[] {
  const radius = (powerD: string) => (337.5 / Number(powerD)).toFixed(3);
  return rows.map((row, index) =>
    index % 3 === 2
      ? {
          ...row,
          flat_radius_mm: radius(row.flat_k_d),
          steep_radius_mm: radius(row.steep_k_d),
          flat_k_d: '',
          steep_k_d: '',
          keratometric_index: '',
        }
      : row,
  );
}

/** A row that the database has already: importing twice changes nothing. */
function knownRows(today: string): TemplateRow[] {
  const known = demoCohort().at(-1);
  return known ? rowsOf(known, today).slice(0, 1) : [];
}

/** Rows that are rightly refused: a length without its decimal mark, and flat and steep the wrong way round. */
function faultyRows(rows: readonly TemplateRow[]): TemplateRow[] {
  const [first, second] = rows;
  if (!first || !second) return [];
  const someone = {
    family_name: 'Errington',
    given_name: 'Wilma',
    birth_date: '1950-05-05',
    sex: 'female',
    record_number: 'D-0309',
  };
  return [
    { ...first, ...someone, axial_length_mm: '2350' },
    { ...second, ...someone, flat_k_d: second.steep_k_d, steep_k_d: second.flat_k_d },
  ];
}
