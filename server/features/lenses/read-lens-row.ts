/** One line of a catalogue file: a model, and its constants of one origin. Pure. */
import {
  CONSTANT_LIMITS,
  CONSTANT_ORIGINS,
  LENS_DESIGNS,
  LENS_KINDS,
  parseDecimal,
  quoted,
  shownText,
  type ConstantOrigin,
  type ConstantValues,
  type LensConstant,
  type LENS_COLUMNS,
  type LensInput,
  type PowerRange,
  type RowProblem,
} from '@/shared/contract';
import { withoutFormulaEscape } from '@/server/csv/formula-text';
import type { CsvHeader } from '@/server/csv/header';
import type { CsvRecord } from '@/server/csv/records';

export type LensColumn = (typeof LENS_COLUMNS)[number];
export type LensFacts = Omit<LensInput, 'constants' | 'isRetired'>;

export interface LensRow {
  row: number;
  name: string;
  origin: ConstantOrigin | undefined;
  facts: LensFacts;
  constants: LensConstant[];
  problems: RowProblem[];
}

interface RowText {
  textAt: (column: LensColumn) => string;
  refuse: (column: LensColumn, message: string) => void;
}

export function readLensRow(header: CsvHeader<LensColumn>, { line, fields }: CsvRecord): LensRow {
  const problems: RowProblem[] = [];
  const textAt = (column: LensColumn): string =>
    withoutFormulaEscape(fields[header.places[column]] ?? '').trim();
  const refuse = (column: LensColumn, message: string): void => {
    problems.push({ column, value: shownText(textAt(column)), message });
  };
  if (fields.length !== header.width) {
    const message = `The row has ${fields.length} fields and the header ${header.width}`;
    problems.push({ column: '', value: '', message });
  }
  const text = { textAt, refuse };
  const origin = readChoice(text, 'constants_origin', CONSTANT_ORIGINS);
  const facts = readFacts(text);
  return { row: line, name: facts.name, origin, facts, constants: readConstants(text, origin), problems };
}

/** The column that a problem of the assembled model belongs to. */
export function columnOf(path: readonly PropertyKey[]): LensColumn {
  return FACT_COLUMNS[String(path[0])] ?? 'constants_source';
}

const FACT_COLUMNS: Readonly<Record<string, LensColumn>> = {
  name: 'name',
  kind: 'kind',
  isToric: 'toric',
  design: 'design',
  powerRanges: 'power_ranges_d',
  cylinderStepsD: 'cylinder_steps_d',
  remarks: 'remarks',
};

function readFacts(text: RowText): LensFacts {
  return {
    name: text.textAt('name'),
    kind: readChoice(text, 'kind', LENS_KINDS) ?? 'monofocal',
    isToric: readChoice(text, 'toric', ['yes', 'no']) === 'yes',
    design: readChoice(text, 'design', LENS_DESIGNS) ?? 'one-piece',
    powerRanges: readRanges(text),
    cylinderStepsD: words(text.textAt('cylinder_steps_d')).map((word) =>
      readNumber(text, 'cylinder_steps_d', word),
    ),
    remarks: text.textAt('remarks'),
  };
}

function readChoice<T extends string>(
  { textAt, refuse }: RowText,
  column: LensColumn,
  choices: readonly T[],
): T | undefined {
  const text = textAt(column).toLowerCase();
  // A model may stand in the catalogue before its constants are known.
  if (text === '' && column === 'constants_origin') return undefined;
  const choice = choices.find((candidate) => candidate === text);
  const list = choices.join(', ');
  if (choice === undefined) refuse(column, `${quoted(textAt(column))} is none of: ${list}`);
  return choice;
}

/** `5:10:1 10:30:0.5` */
function readRanges(text: RowText): PowerRange[] {
  return words(text.textAt('power_ranges_d')).flatMap((word) => {
    const [from, to, step, more] = word.split(':');
    if (from === undefined || to === undefined || step === undefined || more !== undefined) {
      text.refuse('power_ranges_d', `${quoted(word)} is no range: write from:to:step, for example 10:30:0.5`);
      return [];
    }
    const [fromD, toD, stepD] = [from, to, step].map((part) => readNumber(text, 'power_ranges_d', part));
    return [{ fromD: fromD ?? 0, toD: toD ?? 0, stepD: stepD ?? 0 }];
  });
}

function readNumber({ refuse }: RowText, column: LensColumn, word: string): number {
  const value = parseDecimal(word);
  if (typeof value === 'number') return value;
  refuse(column, `${quoted(word)} is not a number`);
  return 0;
}

type ConstantColumns = Record<string, LensColumn>;
const CONSTANT_COLUMNS: Record<LensConstant['formula'], ConstantColumns> = {
  srkt: { aConstant: 'a_constant' },
  t2: { aConstant: 't2_a_constant' },
  holladay1: { surgeonFactorMm: 'surgeon_factor_mm' },
  hofferQ: { pAcdMm: 'pacd_mm' },
  haigis: { a0Mm: 'haigis_a0_mm', a1: 'haigis_a1', a2: 'haigis_a2' },
};

function readConstants(text: RowText, origin: ConstantOrigin | undefined): LensConstant[] {
  const [source, dated] = [text.textAt('constants_source'), text.textAt('constants_dated')];
  const constants = Object.entries(CONSTANT_COLUMNS).flatMap(([formula, columns]) => {
    const values = readConstantValues(text, columns);
    if (!values) return [];
    return [
      { formula: formula as LensConstant['formula'], origin: origin ?? 'optical', values, source, dated },
    ];
  });
  if (constants.length === 0) return [];
  if (origin === undefined)
    text.refuse('constants_origin', 'Say which constants these are: optical or ultrasound');
  if (source === '') text.refuse('constants_source', 'Say where the constants come from');
  if (dated === '') text.refuse('constants_dated', 'Say which day the constants are of, as YYYY-MM-DD');
  return constants;
}

/** All columns of a formula or none. */
function readConstantValues(text: RowText, columns: ConstantColumns): ConstantValues | undefined {
  const entries = Object.entries(columns) as [keyof typeof CONSTANT_LIMITS, LensColumn][];
  if (entries.every(([, column]) => text.textAt(column) === '')) return undefined;
  const values = entries.map(([key, column]) => [key, readConstant(text, key, column)] as const);
  return Object.fromEntries(values) as ConstantValues;
}

function readConstant(text: RowText, key: keyof typeof CONSTANT_LIMITS, column: LensColumn): number {
  const word = text.textAt(column);
  if (word === '') {
    text.refuse(column, 'This constant is missing beside the others of its formula');
    return 0;
  }
  const value = readNumber(text, column, word);
  const { min, max } = CONSTANT_LIMITS[key];
  if (value < min || value > max) text.refuse(column, `Must lie between ${min} and ${max}`);
  return value;
}

function words(text: string): string[] {
  return text.split(/\s+/).filter(Boolean);
}
