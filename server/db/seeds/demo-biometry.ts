/**
 * The file for trying the upload: new people, eyes of known people that were not measured yet, a row that is
 * there already, and rows that are rightly refused. Dated back from the day on which the demonstration began, so
 * that the same file changes nothing the second time, on whatever day.
 */
import { randomFromSeed, type RandomSource } from '@/formulas';
import { TEMPLATE_COLUMNS, type Side } from '@/shared/contract';
import { toCsv } from '@/server/reports/csv';
import { person, type DemoCase } from './demo-case';
import { demoCohort } from './demo-cohort';
import { templateRow, withRadii, type DemoEye, type DemoPerson, type TemplateRow } from './demo-eye';
import { NOT_MEASURED_YET } from './demo-unmeasured';

export const biometryCsv = (rows: readonly TemplateRow[]): Buffer =>
  toCsv({
    columns: TEMPLATE_COLUMNS,
    rows: rows.map((row) => TEMPLATE_COLUMNS.map((column) => row[column])),
  });

/** The file offered on the import page. `demoDay`: ISO date on which the demonstration began. */
export function demoBiometryCsv(demoDay: string): Buffer {
  return biometryCsv([
    ...newcomerRows(demoDay),
    ...secondEyeRows(demoDay),
    ...knownRows(demoDay),
    ...faultyRows(demoDay),
  ]);
}

const SEED = 7000;
const UPLOAD_DAYS_AGO = 1;

/** Some come with both eyes, some with one. */
const NEWCOMERS: readonly { person: DemoPerson; sides: readonly Side[] }[] = [
  { person: person('D-0301', 'Samphire, Nadia', ['1954-04-17', 'female']), sides: ['right', 'left'] },
  { person: person('D-0302', 'Tidewell, Kwabena', ['1949-09-02', 'male']), sides: ['right', 'left'] },
  { person: person('D-0303', 'Upshore, Malika', ['1958-01-30', 'female']), sides: ['right'] },
  { person: person('D-0304', 'Vanewick, Henrik', ['1945-12-12', 'male']), sides: ['right', 'left'] },
  { person: person('D-0305', 'Weirside, Paola', ['1962-07-07', 'female']), sides: ['left'] },
  { person: person('D-0306', 'Yarrowby, Samir', ['1951-03-25', 'male']), sides: ['right', 'left'] },
  { person: person('D-0307', 'Zephyrly, Greta', ['1947-08-19', 'female']), sides: ['right'] },
  { person: person('D-0308', 'Ashgrove-Marevik, Niko', ['1956-10-10', 'male']), sides: ['right', 'left'] },
  { person: person('D-0309', 'Errindale, Wilma', ['1950-05-05', 'female']), sides: ['left'] },
  { person: person('D-0310', 'Quayford, Linh', ['1963-11-28', 'female']), sides: ['right'] },
  { person: person('D-0311', 'Brinebeck, Tomoko', ['1944-02-16', 'female']), sides: ['left'] },
  { person: person('D-0312', 'Ostermarsh, Ilmari', ['1952-08-08', 'male']), sides: ['right'] },
];

/** Every third row carries radii in the place of dioptres. */
function newcomerRows(demoDay: string): TemplateRow[] {
  const rows = NEWCOMERS.flatMap(({ person: somebody, sides }, index) => {
    const eyes = eyesOf(SEED + index);
    return sides.map((side) => templateRow(somebody, side, { eye: eyes[side], today: demoDay }));
  });
  return rows.map((row, index) => (index % 3 === 2 ? withRadii(row) : row));
}

/** Of people who are registered, or of whom one eye is measured and signed. */
function secondEyeRows(demoDay: string): TemplateRow[] {
  const firstRegistered = NOT_MEASURED_YET[0];
  const halfMeasured = demoCohort().filter(({ again, right }) => right === null && again === undefined);
  return [
    ...halfMeasured.map((one) => templateRow(one.person, 'right', { eye: fellowOf(one), today: demoDay })),
    ...(['right', 'left'] as const).map((side) =>
      templateRow(firstRegistered, side, { eye: eyesOf(SEED - 1)[side], today: demoDay }),
    ),
  ];
}

/** The right eye is like the left, which is the one measured. */
function fellowOf({ left }: DemoCase): DemoEye {
  const measured = left ?? eyesOf(SEED).left;
  return {
    ...measured,
    axialLengthMm: measured.axialLengthMm + 0.08,
    flatKD: measured.flatKD - 0.09,
    steepAxisDeg: 180 - measured.steepAxisDeg,
    daysAgo: UPLOAD_DAYS_AGO,
  };
}

function knownRows(demoDay: string): TemplateRow[] {
  const known = demoCohort().at(-1);
  return known?.right ? [templateRow(known.person, 'right', { eye: known.right, today: demoDay })] : [];
}

/** A length without its decimal mark, flat and steep the wrong way round, and a side that is not written out. */
function faultyRows(demoDay: string): TemplateRow[] {
  const rowOf = (record: string, side: Side): TemplateRow => {
    const index = NEWCOMERS.findIndex(({ person: somebody }) => somebody.record === record);
    const somebody = NEWCOMERS[index]?.person ?? NOT_MEASURED_YET[0];
    return templateRow(somebody, side, { eye: eyesOf(SEED + index)[side], today: demoDay });
  };
  const [lengthRow, swappedRow, sideRow] = [
    rowOf('D-0309', 'right'),
    rowOf('D-0303', 'left'),
    rowOf('D-0310', 'left'),
  ];
  return [
    { ...lengthRow, axial_length_mm: lengthRow.axial_length_mm.replace('.', '') },
    { ...swappedRow, flat_k_d: swappedRow.steep_k_d, steep_k_d: swappedRow.flat_k_d },
    { ...sideRow, side: 'OS' },
  ];
}

function eyesOf(seed: number): Record<Side, DemoEye> {
  const random = randomFromSeed(seed);
  const right = rightEye(random);
  const left = {
    ...right,
    axialLengthMm: right.axialLengthMm + between(random, 0.03, 0.14),
    flatKD: right.flatKD + between(random, 0.05, 0.2),
    steepKD: right.steepKD + between(random, 0.02, 0.25),
    steepAxisDeg: 180 - right.steepAxisDeg + random.integerBelow(5),
    acdMm: right.acdMm - 0.03,
    lensThicknessMm: right.lensThicknessMm + 0.04,
    cornealThicknessUm: right.cornealThicknessUm + 3,
  };
  return { right, left };
}

function rightEye(random: RandomSource) {
  const flatKD = between(random, 42.4, 44.4);
  return {
    axialLengthMm: between(random, 22.6, 24.8),
    flatKD,
    steepKD: flatKD + between(random, 0.5, 1.7),
    steepAxisDeg: 80 + random.integerBelow(21),
    acdMm: between(random, 2.8, 3.4),
    lensThicknessMm: between(random, 4.2, 4.8),
    cornealThicknessUm: 520 + random.integerBelow(61),
    whiteToWhiteMm: between(random, 11.5, 12.1),
    daysAgo: UPLOAD_DAYS_AGO,
  };
}

const between = (random: RandomSource, low: number, high: number): number =>
  low + (high - low) * random.uniform();
