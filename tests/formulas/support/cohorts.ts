/** Operated eyes with a known true constant. Invented, from seeded random numbers. */
import { predictRefraction, powerForRefraction } from '@/formulas';
import { averageConstants } from './eyes';
import type { SeededRandom } from './seeded-random';
import type { EyeGeometry, FormulaId, LensConstants, OutcomeCase } from '@/formulas';

export interface CohortPlan {
  formula: FormulaId;
  count: number;
  random: SeededRandom;
  /** The constants that put the lenses where they are; the average ones when absent. */
  constants?: LensConstants;
  /** SD of refraction and of what no measurement says, D. */
  noiseD?: number;
  /** SD that both eyes of a patient share, D; above 0 every patient has two eyes. */
  sharedD?: number;
  axialLengthSdMm?: number;
}

export function anOperatedEye(random: SeededRandom, axialLengthSdMm = 1.1): Required<EyeGeometry> {
  const within = (value: number, min: number, max: number) => Math.min(max, Math.max(min, value));
  const axialLengthMm = within(23.6 + axialLengthSdMm * random.normal(), 20.5, 29.5);
  const meanRadiusMm = within(7.72 + 0.25 * random.normal(), 7.0, 8.6);
  return {
    axialLengthMm,
    flatRadiusMm: meanRadiusMm + 0.08,
    steepRadiusMm: meanRadiusMm - 0.08,
    anteriorChamberDepthMm: within(3.1 + 0.12 * (axialLengthMm - 23.6) + 0.3 * random.normal(), 2.1, 4.4),
  };
}

export function simulatedCases(plan: CohortPlan): OutcomeCase[] {
  const { formula, count, random, noiseD = 0.4, sharedD = 0 } = plan;
  const constants = plan.constants ?? averageConstants[formula];
  let shared = 0;
  return Array.from({ length: count }, (_, index) => {
    const eye = anOperatedEye(random, plan.axialLengthSdMm);
    const powerD =
      Math.round(2 * powerForRefraction(formula, eye, -0.2, averageConstants[formula]).powerD) / 2;
    if (index % 2 === 0) shared = sharedD * random.normal();
    const achievedD =
      predictRefraction(formula, eye, powerD, constants).refractionD + shared + noiseD * random.normal();
    const patient = sharedD > 0 ? { patient: `patient ${Math.floor(index / 2)}` } : {};
    return { eye, powerD, achievedD, origin: 'optical' as const, ...patient };
  });
}
