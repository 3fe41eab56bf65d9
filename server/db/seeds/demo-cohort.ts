/**
 * Everybody of the demonstration who is measured: the named cases, and a cohort of ordinary eyes drawn from a
 * seeded generator round published population means (axial length 23.49 mm, keratometry 44.26 D, chamber
 * depth 3.10 mm, lens thickness 4.52 mm), the two eyes of a person alike but never equal.
 */
import { randomFromSeed } from '@/formulas';
import type { RandomSource } from '@/formulas';
import { DEMO_CASES } from './demo-cases';
import type { DemoCase } from './demo-cases';
import type { DemoEye, DemoPerson } from './demo-eye';

const SEED = 20260115;

const NAMES = [
  'Abbotsey, Lena',
  'Birchmoor, Anton',
  'Coveley, Marta',
  'Drystone, Pavel',
  'Elmsway, Ingrid',
  'Fordmere, Luka',
  'Grantley, Ebele',
  'Heronsby, Vera',
  'Ivywell, Dmitri',
  'Juniperly, Sunniva',
  'Kilnworth, Amara',
  'Larkmoor, Pieter',
  'Millbeck, Rana',
  'Northey, Gustav',
  'Osierford, Lucia',
  'Pebbleton, Matteo',
  'Quarrier, Hana',
  'Reedham, Idris',
] as const;

const clamp = (value: number, low: number, high: number): number => Math.min(Math.max(value, low), high);
const hundredths = (value: number): number => Number(value.toFixed(2));

export function demoCohort(): DemoCase[] {
  const random = randomFromSeed(SEED);
  const ordinary = NAMES.map((name, index) => ordinaryCase(random, name, index));
  return [...DEMO_CASES, ...ordinary];
}

function ordinaryCase(random: RandomSource, name: string, index: number): DemoCase {
  const [family = '', given = ''] = name.split(', ');
  const sex = index % 2 === 0 ? 'female' : 'male';
  const person: DemoPerson = {
    record: `D-${201 + index}`.replace('D-', 'D-0'),
    family,
    given,
    born: birthDate(random),
    sex,
  };
  const right = ordinaryEye(random);
  return { story: 'an ordinary eye', person, right, left: fellowOf(random, right), plan: planOf(index) };
}

/** Some eyes are signed, some drafted, most still wait. */
function planOf(index: number): DemoCase['plan'] {
  if (index < 5) return { right: 'signed' };
  if (index < 7) return { right: 'signed', left: 'draft' };
  return undefined;
}

function birthDate(random: RandomSource): string {
  const year = 1938 + Math.floor(random.uniform() * 27);
  const month = 1 + Math.floor(random.uniform() * 12);
  const day = 1 + Math.floor(random.uniform() * 28);
  return `${year}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`;
}

function ordinaryEye(random: RandomSource): DemoEye {
  const meanKD = clamp(44 + 1.1 * random.normal(), 41.6, 46.4);
  const cylinderD = clamp(0.75 + 0.35 * Math.abs(random.normal()), 0.4, 1.9);
  return {
    axialLengthMm: hundredths(clamp(23.5 + 0.75 * random.normal(), 22.1, 25.2)),
    flatKD: hundredths(meanKD - cylinderD / 2),
    steepKD: hundredths(meanKD + cylinderD / 2),
    steepAxisDeg: Math.round(clamp(90 + 12 * random.normal(), 60, 120)),
    acdMm: hundredths(clamp(3.1 + 0.25 * random.normal(), 2.55, 3.6)),
    lensThicknessMm: hundredths(clamp(4.5 + 0.25 * random.normal(), 3.9, 4.95)),
    cornealThicknessUm: Math.round(clamp(545 + 30 * random.normal(), 480, 610)),
    whiteToWhiteMm: hundredths(clamp(11.8 + 0.3 * random.normal(), 11, 12.6)),
    daysAgo: 5 + Math.floor(random.uniform() * 60),
  };
}

/** The other eye of the same person: close, mirrored in its axis. */
function fellowOf(random: RandomSource, eye: DemoEye): DemoEye {
  const shiftKD = 0.2 * random.normal();
  return {
    ...eye,
    axialLengthMm: hundredths(eye.axialLengthMm + clamp(0.1 * random.normal(), -0.25, 0.25) + 0.01),
    flatKD: hundredths(eye.flatKD + shiftKD),
    steepKD: hundredths(eye.steepKD + shiftKD + 0.05),
    steepAxisDeg: Math.round(clamp(180 - eye.steepAxisDeg + 4 * random.normal(), 55, 125)),
    acdMm: hundredths((eye.acdMm ?? 3.1) + 0.03 * random.normal()),
    lensThicknessMm: hundredths((eye.lensThicknessMm ?? 4.5) + 0.04 * random.normal()),
  };
}
