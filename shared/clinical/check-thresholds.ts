/**
 * Thresholds of the checks, in one table: a practice may work with another of the same shape. Their sources and
 * marks stand beside the rules that use them.
 */
import type { Band } from './limits';

interface NoteAndWeigh {
  note: number;
  weigh: number;
}

export interface CheckLimits {
  axialLengthMm: Band;
  meanKeratometryD: Band;
  /** One meridian. */
  keratometryD: Band;
  cornealCylinderD: number;
  betweenEyesAxialLengthMm: NoteAndWeigh;
  betweenEyesKeratometryD: number;
  axialLengthSdMm: { optical: NoteAndWeigh; ultrasound: NoteAndWeigh };
  lensThicknessMm: NoteAndWeigh & { low: number };
  lensThicknessOverFellowMm: number;
  shallowChamberMm: number;
  veryShallowChamberMm: number;
  deepChamberMm: number;
  chamberAndLensMm: Band & { impossible: number };
  whiteToWhiteMm: Band;
  cornealThicknessUm: Band;
  axialLengthToRadius: Band;
  /** Whole months since the measurement. */
  ageMonths: NoteAndWeigh;
  axisMattersFromD: number;
  youngYears: number;
  /** Of the plan itself. */
  targetD: Band;
  powerD: Band;
  formulaDisagreementD: NoteAndWeigh;
  unadjustedAxialLengthMm: number;
}

export const CHECK_LIMITS: CheckLimits = {
  axialLengthMm: { low: 21.3, high: 26.6 },
  meanKeratometryD: { low: 41, high: 47 },
  keratometryD: { low: 38, high: 50 },
  cornealCylinderD: 2.5,
  betweenEyesAxialLengthMm: { note: 0.3, weigh: 0.7 },
  betweenEyesKeratometryD: 0.9,
  axialLengthSdMm: { optical: { note: 0.03, weigh: 0.05 }, ultrasound: { note: 0.1, weigh: 0.12 } },
  lensThicknessMm: { low: 3.5, note: 5, weigh: 5.4 },
  lensThicknessOverFellowMm: 0.5,
  shallowChamberMm: 2.5,
  veryShallowChamberMm: 2.2,
  deepChamberMm: 4.2,
  chamberAndLensMm: { low: 6.5, high: 8.5, impossible: 11 },
  whiteToWhiteMm: { low: 10.75, high: 13 },
  cornealThicknessUm: { low: 450, high: 620 },
  axialLengthToRadius: { low: 2.7, high: 3.5 },
  ageMonths: { note: 12, weigh: 24 },
  axisMattersFromD: 0.75,
  youngYears: 45,
  targetD: { low: -3, high: 0.25 },
  powerD: { low: 6, high: 30 },
  formulaDisagreementD: { note: 0.5, weigh: 1 },
  unadjustedAxialLengthMm: 26.5,
};
