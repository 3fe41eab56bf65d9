/**
 * Back-calculated lens position — where the lens must lie for the refraction that was achieved, and the constant that
 * would have put it there.
 *
 * Inputs: corneal power and optical length in the formula's own terms, implanted power and achieved refraction, D;
 *   vertex distance, mm. For the ideal constant: a formula, a case and its constants.
 * Result: lens plane in mm from the cornea; the ideal constant of one eye; null where there is none.
 * Outside the valid range: null for a lens without power (its place has no effect), and where no place between cornea
 *   and the middle of the eye gives that refraction.
 * Source: the thin-lens core of all formulas solved for the lens plane [D]; Holladay et al., J Cataract Refract Surg
 *   1988;14:17-24 (surgeon factor by the reverse solution) [V abstract].
 * Erratum / variant: the mean of ideal constants is not the constant of zero mean error, and scatters more: Langenbucher
 *   et al. 2025, PMC12340178 [V abstract]. For showing an eye, not for choosing a constant.
 *
 *   d = [ (L+s) - sqrt((s-L)^2 + 4 n (s-L)/P) ] / 2 ,  s = n/(Kc+Rc)
 */
import { AQUEOUS_MM_D } from '../optics/thin-lens';
import { cornealFromSpectacleD } from '../units/vertex';
import { prepareCohort } from './cohort';
import type { Cohort, CohortEye, CohortQuestion, OutcomeCase } from './cohort';

export interface ImplantedEye {
  cornealPowerD: number;
  opticalLengthMm: number;
  powerD: number;
  achievedD: number;
  vertexMm: number;
}

export function findLensPlane(eye: ImplantedEye): number | null {
  if (eye.powerD === 0) return null;
  const behindCorneaD = eye.cornealPowerD + cornealFromSpectacleD(eye.achievedD, eye.vertexMm);
  if (!(behindCorneaD > 0)) return null;
  const focusMm = AQUEOUS_MM_D / behindCorneaD; // s
  const beyondMm = focusMm - eye.opticalLengthMm;
  const radicand = beyondMm * beyondMm + (4 * AQUEOUS_MM_D * beyondMm) / eye.powerD;
  if (radicand < 0) return null;
  const planeMm = (eye.opticalLengthMm + focusMm - Math.sqrt(radicand)) / 2;
  return planeMm > 0 && planeMm < eye.opticalLengthMm / 2 ? planeMm : null;
}

/** The single constant that would have predicted this eye exactly. */
export function findIdealConstant(
  question: Omit<CohortQuestion, 'cases' | 'origin'> & { outcome: OutcomeCase },
): { value: number; lensPlaneMm: number } | null {
  const { outcome, ...rest } = question;
  const cohort = prepareCohort({ ...rest, cases: [outcome], origin: outcome.origin });
  const eye = cohort.eyes[0];
  const lensPlaneMm = eye === undefined ? null : lensPlaneOf(cohort, eye);
  if (eye === undefined || lensPlaneMm === null) return null;
  const value = cohort.publishedValue + (lensPlaneMm - eye.optics.lensPlaneMm) / cohort.planePerUnitMm;
  return { value, lensPlaneMm };
}

export function lensPlaneOf(cohort: Cohort, eye: CohortEye): number | null {
  const { cornealPowerD, opticalLengthMm } = eye.optics;
  const { powerD, achievedD } = eye;
  return findLensPlane({ cornealPowerD, opticalLengthMm, powerD, achievedD, vertexMm: cohort.vertexMm });
}
