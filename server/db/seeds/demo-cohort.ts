/**
 * Everybody of the demonstration who is measured: the named cases, and a cohort of ordinary eyes drawn from a
 * seeded generator round published population means (axial length 23.49 mm, keratometry 44.26 D, chamber
 * depth 3.10 mm, lens thickness 4.52 mm), the two eyes of a person alike but never equal.
 */
import { randomFromSeed, type RandomSource } from '@/formulas';
import { chosen, draft, person, signed, type DemoCase } from './demo-case';
import { CATARACT_CASES } from './demo-cases-cataracts';
import { CORNEA_CASES } from './demo-cases-corneas';
import { COURSE_CASES } from './demo-cases-course';
import { RECORD_CASES } from './demo-cases-records';
import { SHAPE_CASES } from './demo-cases-shapes';
import type { DemoEye } from './demo-eye';

const SEED = 20260115;
const FIRST_ORDINARY_RECORD = 201;

const NAMES = [
  ['Bojsen-Marehalm', 'Lars-Erik'],
  ['Brisenoire', 'Élodie'],
  ['Coveley', 'Yuki'],
  ['Drystone', 'Pavel'],
  ['Fordmere', 'Emeka'],
  ['Gavotte-Seabright', 'Maria-Konstantina'],
  ['Heronsby', 'Vera'],
  ['Kilnworth', 'Tariq'],
  ['Larkmoor', 'Mei-Lin'],
  ['Millbeck', 'Rana'],
  ['Osierford', 'Mateus'],
  ['Pebbleton', 'Eun-ji'],
  ['Reedham', 'Idris'],
] as const;

/** Days on which files came in; eyes are measured on one of them. */
const CLINIC_DAYS_AGO = [47, 33, 26, 19, 12, 5] as const;

const clamp = (value: number, low: number, high: number): number => Math.min(Math.max(value, low), high);
const hundredths = (value: number): number => Number(value.toFixed(2));

export function demoCohort(): DemoCase[] {
  const random = randomFromSeed(SEED);
  const ordinary = NAMES.map((name, index) => ordinaryCase(random, name, index));
  return [...SHAPE_CASES, ...CORNEA_CASES, ...CATARACT_CASES, ...RECORD_CASES, ...COURSE_CASES, ...ordinary];
}

function ordinaryCase(
  random: RandomSource,
  [family, given]: readonly [string, string],
  index: number,
): DemoCase {
  const sex = index % 2 === 0 ? 'male' : 'female';
  const record = `D-0${FIRST_ORDINARY_RECORD + index}`;
  const daysAgo = CLINIC_DAYS_AGO[index % CLINIC_DAYS_AGO.length] ?? 5;
  const right = { ...ordinaryEye(random), daysAgo };
  return {
    story: 'ordinary eyes',
    person: person(record, `${family}, ${given}`, [birthDate(random), sex]),
    right,
    left: fellowOf(random, right),
    plan: planOf(index, daysAgo),
  };
}

/** Some eyes are signed, some drafted, most still wait. */
function planOf(index: number, daysAgo: number): DemoCase['plan'] {
  if (index === 1) return { right: signed(daysAgo - 3, 'Lantern Three Distances', 0) };
  if (index === 3) return { right: signed(daysAgo - 3), left: signed(daysAgo - 3) };
  if (index < 5) return { right: signed(daysAgo - 3) };
  if (index === 5) return { right: chosen(2) };
  if (index === 6) return { right: draft(2) };
  return undefined;
}

function birthDate(random: RandomSource): string {
  const two = (value: number): string => String(value).padStart(2, '0');
  const year = 1938 + random.integerBelow(27);
  const month = 1 + random.integerBelow(12);
  return `${year}-${two(month)}-${two(1 + random.integerBelow(28))}`;
}

/** Longer eyes are flatter and deeper, deeper eyes have thinner lenses. */
function ordinaryEye(random: RandomSource): DemoEye {
  const axialLengthMm = clamp(23.49 + 0.75 * random.normal(), 22.1, 25.2);
  const longerMm = axialLengthMm - 23.49;
  const meanKD = clamp(44.1 - 0.45 * longerMm + 1.1 * random.normal(), 41.6, 46.4);
  const cylinderD = clamp(0.75 + 0.35 * random.normal(), 0.4, 1.9);
  const acdMm = clamp(3.1 + 0.17 * longerMm + 0.25 * random.normal(), 2.55, 3.6);
  return {
    axialLengthMm: hundredths(axialLengthMm),
    flatKD: hundredths(meanKD - cylinderD / 2),
    steepKD: hundredths(meanKD + cylinderD / 2),
    steepAxisDeg: steepAxisDeg(random),
    acdMm: hundredths(acdMm),
    lensThicknessMm: hundredths(clamp(4.5 - 0.4 * (acdMm - 3.1) + 0.22 * random.normal(), 3.9, 4.95)),
    cornealThicknessUm: Math.round(clamp(545 + 30 * random.normal(), 480, 610)),
    whiteToWhiteMm: hundredths(clamp(11.8 + 0.3 * random.normal(), 11, 12.6)),
  };
}

/** Mostly with the rule, in some against it. */
function steepAxisDeg(random: RandomSource): number {
  const middleDeg = random.uniform() < 0.65 ? 90 : 180;
  return wholeAxis(middleDeg + clamp(8 * random.normal(), -20, 20));
}

/** The other eye of the same person: close, mirrored in its axis. */
function fellowOf(random: RandomSource, eye: DemoEye): DemoEye {
  const shiftKD = clamp(0.2 * random.normal(), -0.5, 0.5);
  const shifted = (value: number | undefined, sd: number): number =>
    (value ?? 0) + clamp(sd * random.normal(), -2 * sd, 2 * sd);
  return {
    ...eye,
    axialLengthMm: hundredths(eye.axialLengthMm + clamp(0.1 * random.normal(), -0.25, 0.25) + 0.01),
    flatKD: hundredths(eye.flatKD + shiftKD),
    steepKD: hundredths(eye.steepKD + shiftKD + 0.05),
    steepAxisDeg: wholeAxis(180 - eye.steepAxisDeg + clamp(4 * random.normal(), -10, 10)),
    acdMm: hundredths(shifted(eye.acdMm, 0.03)),
    lensThicknessMm: hundredths(shifted(eye.lensThicknessMm, 0.04)),
    cornealThicknessUm: Math.round(shifted(eye.cornealThicknessUm, 4)),
    whiteToWhiteMm: hundredths(shifted(eye.whiteToWhiteMm, 0.05)),
  };
}

function wholeAxis(axisDeg: number): number {
  const whole = Math.round(axisDeg) % 180;
  return whole > 0 ? whole : whole + 180;
}
