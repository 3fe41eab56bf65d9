/**
 * Constant of zero mean error — the constant with which the predictions of own cases are right on average.
 *
 * Inputs: formula, cases of one origin, that origin, the constants in force.
 * Result: the constant with its standard error and 95 % interval, in its own unit; the prediction errors with it, D; the
 *   mean error with the constants in force.
 * Outside the valid range: throws MixedOriginsError, UnusableCaseError, TooFewValuesError for fewer than two patients,
 *   NoConstantError where no constant within its limits does it.
 * Source: Hoffer et al., Am J Ophthalmol 2015;160:1086 [V excerpt]: zero the mean error per formula by changing the
 *   constant; standard error by the delta method, SE(mean error) over its change per unit of the constant [D].
 * Erratum / variant: on refraction, not on the mean of the eyes' ideal constants, which differs and scatters more. Haigis:
 *   a0 alone. The mean error falls with the constant wherever the lens has positive power [D]. Both eyes of a patient
 *   count as related.
 */
import { OutOfRangeError } from '../errors';
import { checkRange, hardLimits } from '../limits';
import { checkLensPlane } from '../optics/thin-lens';
import { findBracket } from '../solvers/bracket';
import { DivergedError } from '../solvers/diverged-error';
import { findRoot } from '../solvers/root';
import { clusteredMean, designEffect } from '../statistics/clustered-mean';
import { TooFewValuesError } from '../statistics/errors';
import { sampleSd } from '../statistics/mean-and-deviation';
import { errorAt, planeAt, prepareCohort, refractionPerMm } from './cohort';
import { NoConstantError } from './errors';
import { personalConstants, withPersonalValue } from './personal-constant';
import type { ConstantKey } from '../constants/kinds';
import type { Root } from '../solvers/root';
import type { Interval } from '../statistics/wilson-interval';
import type { FormulaId, LensConstants } from '../types';
import type { Cohort, CohortEye, CohortQuestion } from './cohort';
import type { MeasurementOrigin } from './origin';

export interface ZeroedConstant {
  formula: FormulaId;
  origin: MeasurementOrigin;
  /** Which constant was changed. */
  key: ConstantKey;
  value: number;
  /** Complete, ready for a prediction. */
  constants: LensConstants;
  publishedValue: number;
  caseCount: number;
  patientCount: number;
  /** With the constants in force, D. */
  meanErrorBeforeD: number;
  /** With the new constant, in the order of the cases, D. */
  errorsD: number[];
  sdD: number;
  /** Of the mean error: variance over that of as many independent eyes. */
  designEffect: number;
  /** Change of the mean predicted refraction per unit of the constant, D. */
  refractionPerUnitD: number;
  /** In the unit of the constant. */
  standardError: number;
  /** 95 %, Student, patients less one degrees of freedom. */
  interval: Interval;
  iterations: number;
}

/** Half a millimetre of lens plane, about two thirds of a dioptre: most constants lie within. */
const FIRST_STEP_MM = 0.5;
const TOLERANCE = 1e-12;

export function zeroMeanErrorConstant(question: CohortQuestion): ZeroedConstant {
  return zeroCohort(prepareCohort(question));
}

export function zeroCohort(cohort: Cohort): ZeroedConstant {
  const { formula, eyes } = cohort;
  if (eyes.length < 2) throw new TooFewValuesError('constant of zero mean error', eyes.length, 2);
  const { value, iterations } = zeroValue(cohort, eyes);
  const errorsD = eyes.map((eye) => errorAt(cohort, eye, value));
  const clusters = eyes.map(({ cluster }) => cluster);
  const centre = clusteredMean(errorsD, clusters);
  const refractionPerUnitD = meanRefractionPerUnit(cohort, eyes, value);
  const half = (centre.interval.high - centre.interval.low) / 2 / refractionPerUnitD;
  return {
    formula,
    origin: cohort.origin,
    key: personalConstants[formula].key,
    value,
    constants: withPersonalValue(formula, cohort.published, value),
    publishedValue: cohort.publishedValue,
    caseCount: eyes.length,
    patientCount: centre.clusterCount,
    meanErrorBeforeD: meanErrorAt(cohort, eyes, cohort.publishedValue) + 0,
    errorsD,
    sdD: sampleSd(errorsD),
    designEffect: designEffect(errorsD, clusters),
    refractionPerUnitD,
    standardError: centre.standardError / refractionPerUnitD,
    interval: { low: value - half, high: value + half },
    iterations,
  };
}

/** For some of the eyes, as the folds of a cross-check need it. */
export function zeroValue(cohort: Cohort, eyes: readonly CohortEye[]): Root {
  const { formula, planePerUnitMm, publishedValue } = cohort;
  const limits = hardLimits[personalConstants[formula].key];
  if (!(meanRefractionPerUnit(cohort, eyes, publishedValue) > 0)) {
    throw new NoConstantError(formula, 'these lenses hardly act on the refraction by their place');
  }
  const meanAt = (value: number) => meanErrorAt(cohort, eyes, value);
  try {
    const step = FIRST_STEP_MM / planePerUnitMm;
    const bracket = findBracket(meanAt, { start: publishedValue, step, limits });
    const root = findRoot(meanAt, { ...bracket, tolerance: TOLERANCE });
    checkRange(personalConstants[formula].key, root.value, limits);
    for (const eye of eyes) {
      checkLensPlane({ ...eye.optics, lensPlaneMm: planeAt(cohort, eye, root.value) });
    }
    return root;
  } catch (cause) {
    if (!(cause instanceof DivergedError || cause instanceof OutOfRangeError)) throw cause;
    throw new NoConstantError(formula, cause.message);
  }
}

export function meanErrorAt(cohort: Cohort, eyes: readonly CohortEye[], value: number): number {
  let sum = 0;
  for (const eye of eyes) sum += errorAt(cohort, eye, value);
  return sum / eyes.length;
}

function meanRefractionPerUnit(cohort: Cohort, eyes: readonly CohortEye[], value: number): number {
  let sum = 0;
  for (const eye of eyes) sum += refractionPerMm(cohort, eye, planeAt(cohort, eye, value));
  return (cohort.planePerUnitMm * sum) / eyes.length;
}
