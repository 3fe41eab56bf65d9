/**
 * Cohort — operated eyes with their refraction, ready to be predicted again with any constant.
 *
 * Inputs: formula; cases, each with measurements, implanted power and achieved spherical equivalent in D, the origin of
 *   its axial length, and the patient where both eyes may be among them; origin that the constant is for; published:
 *   the constants in force.
 * Result: for each eye what does not depend on the constant, worked out once; prediction errors for any constant.
 * Outside the valid range: throws MixedOriginsError for a case of another origin, UnusableCaseError naming a case that
 *   the formula refuses.
 * Source: Wang, Koch, Hill, Abulafia, J Cataract Refract Surg 2017;43:999 [V first page]: predict again with the power
 *   implanted; common practice: ultrasound and optical cases are never pooled.
 * Erratum / variant: error = achieved minus predicted, positive for a hyperopic surprise; some authors turn it round.
 *
 *   v = n/(L-d) - P ;  R = Rc/(1 + 0.001 V Rc), Rc = v/(1 + v d/n) - Kc
 *   dR/dd = ((n/(L-d)^2) - v^2/n) / (1 + v d/n)^2 / (1 + 0.001 V Rc)^2
 */
import { checkConstants } from '../constants/kinds';
import { checkRange, hardLimits } from '../limits';
import { AQUEOUS_MM_D, refractionWithPower, thinLens } from '../optics/thin-lens';
import { checkRequest, opticsOf, vertexOf } from '../predict/request';
import { cornealFromSpectacleD } from '../units/vertex';
import { MixedOriginsError, UnusableCaseError } from './errors';
import { personalConstants, personalValue } from './personal-constant';
import type { ThinLensEye } from '../optics/thin-lens';
import type { EyeGeometry, FormulaId, FormulaOptions, LensConstants } from '../types';
import type { MeasurementOrigin } from './origin';

export interface OutcomeCase {
  eye: EyeGeometry;
  /** As implanted, not as planned. */
  powerD: number;
  /** Spherical equivalent at the spectacle plane, refraction stable. */
  achievedD: number;
  origin: MeasurementOrigin;
  /** The same for both eyes of a patient; a patient of its own when absent. */
  patient?: string;
}

export interface CohortQuestion {
  formula: FormulaId;
  cases: readonly OutcomeCase[];
  origin: MeasurementOrigin;
  /** The constants in force: where the search starts, and what few cases are drawn towards. */
  published: LensConstants;
  /** Eyes after corneal refractive surgery do not belong here, so there is no second cornea. */
  options?: Omit<FormulaOptions, 'elpCornea'>;
}

export interface CohortEye {
  /** With the published constants. */
  optics: ThinLensEye;
  powerD: number;
  achievedD: number;
  axialLengthMm: number;
  anteriorChamberDepthMm: number | undefined;
  /** Number of the patient. */
  cluster: number;
}

export interface Cohort {
  formula: FormulaId;
  origin: MeasurementOrigin;
  published: LensConstants;
  publishedValue: number;
  planePerUnitMm: number;
  vertexMm: number;
  eyes: readonly CohortEye[];
}

export function prepareCohort(question: CohortQuestion): Cohort {
  const { formula, origin, published, options = {} } = question;
  checkConstants(formula, published);
  const patients = new Map<string, number>();
  const eyes = question.cases.map((one, index) => {
    if (one.origin !== origin) throw new MixedOriginsError(index, origin, one.origin);
    return { ...usableEye(question, one, index), cluster: clusterOf(one, index, patients) };
  });
  return {
    formula,
    origin,
    published,
    publishedValue: personalValue(formula, published),
    planePerUnitMm: personalConstants[formula].planePerUnitMm,
    vertexMm: vertexOf({ options }),
    eyes,
  };
}

/** Where this eye's lens plane lies with another constant, mm. */
export function planeAt(cohort: Cohort, eye: CohortEye, value: number): number {
  return eye.optics.lensPlaneMm + cohort.planePerUnitMm * (value - cohort.publishedValue);
}

/** Achieved minus predicted, D. */
export function errorAt(cohort: Cohort, eye: CohortEye, value: number): number {
  const lens = thinLens({ ...eye.optics, lensPlaneMm: planeAt(cohort, eye, value) }, cohort.vertexMm);
  return eye.achievedD - refractionWithPower(lens, eye.powerD);
}

/** Change of the predicted refraction per mm of lens plane, D/mm: positive for a plus lens. */
export function refractionPerMm(cohort: Cohort, eye: CohortEye, lensPlaneMm: number): number {
  const { opticalLengthMm, cornealPowerD } = eye.optics;
  const behindMm = opticalLengthMm - lensPlaneMm;
  const v = AQUEOUS_MM_D / behindMm - eye.powerD;
  const stretch = 1 + (v * lensPlaneMm) / AQUEOUS_MM_D;
  const spectacle = 1 + 0.001 * cohort.vertexMm * (v / stretch - cornealPowerD);
  const moved = AQUEOUS_MM_D / (behindMm * behindMm) - (v * v) / AQUEOUS_MM_D;
  return moved / (stretch * stretch) / (spectacle * spectacle);
}

/** Throws UnusableCaseError where the formula refuses the case. */
export function usableEye(
  question: CohortQuestion,
  one: OutcomeCase,
  index: number,
): Omit<CohortEye, 'cluster'> {
  const { formula, published, options = {} } = question;
  const request = { formula, eye: one.eye, constants: published, options };
  try {
    checkRequest(request);
    checkRange('powerD', one.powerD, hardLimits.powerD);
    checkRange('achievedD', one.achievedD, hardLimits.targetD);
    cornealFromSpectacleD(one.achievedD, vertexOf(request));
    const optics = opticsOf(request);
    refractionWithPower(thinLens(optics, vertexOf(request)), one.powerD);
    return {
      optics,
      powerD: one.powerD,
      achievedD: one.achievedD,
      axialLengthMm: one.eye.axialLengthMm,
      anteriorChamberDepthMm: one.eye.anteriorChamberDepthMm,
    };
  } catch (cause) {
    throw new UnusableCaseError(index, cause);
  }
}

/** Negative numbers for eyes without a patient, so that none is taken for another's fellow. */
function clusterOf(one: OutcomeCase, index: number, patients: Map<string, number>): number {
  if (one.patient === undefined) return -1 - index;
  const known = patients.get(one.patient);
  if (known !== undefined) return known;
  patients.set(one.patient, patients.size);
  return patients.size - 1;
}
