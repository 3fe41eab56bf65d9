/**
 * Haigis triple — all three constants of Haigis from own cases.
 *
 * Inputs: cases of one origin with anterior chamber depths, that origin, the constants in force.
 * Result: a0, a1 and a2 with the standard errors of a1 and a2; the prediction errors with them; how many eyes had no
 *   back-calculated lens position and took no part in the fit.
 * Outside the valid range: throws TooFewValuesError below 250 eyes, DegenerateDataError where axial lengths span too
 *   little, MixedOriginsError, UnusableCaseError, NoConstantError.
 * Source: Haigis, in: Shammas (ed), Intraocular Lens Power Calculations, Slack 2004, ch. 5 (regression of the lens
 *   position on depth and length) [M]; a0 zeroed afterwards, as fitting scatter alone leaves an offset: Langenbucher et
 *   al., PLOS ONE 2022 e0267352 [V abstract].
 * Erratum / variant: each eye weighs by the square of what a millimetre does to its refraction [D]: 1.36 D with a lens
 *   of 21 D, 0.16 D with one of 3 D, whose place is therefore known eight times less well. The interval of a0 takes a1
 *   and a2 as given.
 */
import { DegenerateDataError, TooFewValuesError } from '../statistics/errors';
import { fitTwoRegressors } from '../statistics/two-regressor-fit';
import { prepareCohort, refractionPerMm } from './cohort';
import { gateCases, TRIPLE_AXIAL_LENGTH_SPAN_MM, tripleGateOf } from './gates';
import { lensPlaneOf } from './lens-position';
import { zeroMeanErrorConstant } from './zero-mean-error';
import type { FitRow } from '../statistics/two-regressor-fit';
import type { Cohort, CohortEye, CohortQuestion } from './cohort';
import type { ZeroedConstant } from './zero-mean-error';

export type TripleQuestion = Omit<CohortQuestion, 'formula'>;

export interface HaigisTriple {
  constants: { a0Mm: number; a1: number; a2: number };
  a1StandardError: number;
  a2StandardError: number;
  withoutPosition: number;
  /** a0 zeroed with the new a1 and a2. */
  zeroed: ZeroedConstant;
}

export function haigisTriple(question: TripleQuestion): HaigisTriple {
  const { cases } = question;
  if (cases.length < gateCases.triple) {
    throw new TooFewValuesError('Haigis triple', cases.length, gateCases.triple);
  }
  const gate = tripleGateOf(cases.map(({ eye }) => eye.axialLengthMm));
  if (!gate.isOpen) {
    const span = gate.axialLengthSpanMm.toFixed(2);
    throw new DegenerateDataError(
      'Haigis triple',
      `the middle 90 % of axial lengths span ${span} mm, less than ${TRIPLE_AXIAL_LENGTH_SPAN_MM} mm`,
    );
  }
  return fitTriple(question);
}

/** Without the gate, as the folds of a cross-check need it. */
export function fitTriple(question: TripleQuestion): HaigisTriple {
  const cohort = prepareCohort({ ...question, formula: 'haigis' });
  const rows = cohort.eyes.flatMap((eye) => rowOf(cohort, eye));
  const fit = fitTwoRegressors(rows);
  const slopes = { a1: fit.firstSlope, a2: fit.secondSlope };
  const zeroed = zeroMeanErrorConstant({
    ...question,
    formula: 'haigis',
    published: { a0Mm: fit.intercept, ...slopes },
  });
  return {
    constants: { a0Mm: zeroed.value, ...slopes },
    a1StandardError: fit.firstStandardError,
    a2StandardError: fit.secondStandardError,
    withoutPosition: cohort.eyes.length - rows.length,
    zeroed,
  };
}

/** One row for an eye with a back-calculated lens position, none for one without. */
function rowOf(cohort: Cohort, eye: CohortEye): FitRow[] {
  const lensPlaneMm = lensPlaneOf(cohort, eye);
  if (lensPlaneMm === null || eye.anteriorChamberDepthMm === undefined) return [];
  const weight = refractionPerMm(cohort, eye, lensPlaneMm) ** 2;
  return [
    {
      first: eye.anteriorChamberDepthMm,
      // The length that the formula sees, after an adjustment for long eyes.
      second: eye.optics.opticalLengthMm,
      explained: lensPlaneMm,
      weight,
      cluster: eye.cluster,
    },
  ];
}
