/**
 * Out-of-sample effect — what a personalised constant would have done for cases that it was not fitted to.
 *
 * Inputs: cases of one origin, that origin, the constants in force; method: one constant zeroed and shrunk, or Haigis'
 *   three; foldCount, 10 when absent; seed, 1 when absent.
 * Result: summaries of the errors with the constants in force and out of sample; both lists, D; by how much the mean
 *   absolute error falls, D, with an interval that knows about patients.
 * Outside the valid range: throws TooFewValuesError for fewer patients than folds, InvalidOptionError for three constants
 *   of another formula than Haigis, and what the fit throws.
 * Source: Stone, J R Stat Soc B 1974;36:111-147 (cross-validation) [M].
 * Erratum / variant: the fit in each fold follows the same rule as the proposal, shrinkage included. The interval takes
 *   the folds' constants as given; they share most of their cases.
 */
import { InvalidOptionError } from '../errors';
import { clusteredMean, designEffect } from '../statistics/clustered-mean';
import { summariseErrors } from '../statistics/error-summary';
import { foldOfEach, outOfSampleErrors } from '../statistics/k-fold';
import { sampleSd } from '../statistics/mean-and-deviation';
import { errorAt, prepareCohort } from './cohort';
import { expectedErrorSdD } from './expected-error';
import { fitTriple } from './haigis-triple';
import { PRIOR_SD_D, shrunkValue } from './shrinkage';
import { zeroValue } from './zero-mean-error';
import type { ErrorSummary } from '../statistics/error-summary';
import type { Interval } from '../statistics/wilson-interval';
import type { Cohort, CohortEye, CohortQuestion } from './cohort';
import type { ShrinkageOptions } from './shrinkage';

export interface OutOfSampleQuestion extends CohortQuestion, ShrinkageOptions {
  method?: 'shrunk' | 'haigisTriple';
  foldCount?: number;
  seed?: number;
}

export interface OutOfSampleEffect {
  foldCount: number;
  before: ErrorSummary;
  after: ErrorSummary;
  errorsBeforeD: number[];
  errorsAfterD: number[];
  /** Mean of |before| - |after|: positive when the eyes land closer. */
  gain: { meanAbsoluteD: number; interval: Interval };
}

const FOLDS = 10;

export function outOfSampleEffect(question: OutOfSampleQuestion): OutOfSampleEffect {
  const { foldCount = FOLDS, seed = 1 } = question;
  if (question.method === 'haigisTriple' && question.formula !== 'haigis') {
    throw new InvalidOptionError('method', question.method, `does not belong to ${question.formula}`);
  }
  const cohort = prepareCohort(question);
  const clusters = cohort.eyes.map(({ cluster }) => cluster);
  const foldOf = foldOfEach({ clusters, foldCount, seed });
  const errorsBeforeD = cohort.eyes.map((eye) => errorAt(cohort, eye, cohort.publishedValue));
  const errorsAfterD =
    question.method === 'haigisTriple'
      ? tripleErrors(question, foldOf)
      : shrunkErrors({ cohort, question, foldOf });
  const gains = errorsBeforeD.map((before, eye) => Math.abs(before) - Math.abs(errorsAfterD[eye] ?? NaN));
  const gain = clusteredMean(gains, clusters);
  return {
    foldCount,
    before: summariseErrors(errorsBeforeD, clusters),
    after: summariseErrors(errorsAfterD, clusters),
    errorsBeforeD,
    errorsAfterD,
    gain: { meanAbsoluteD: gain.mean, interval: gain.interval },
  };
}

interface FoldedCohort {
  cohort: Cohort;
  question: OutOfSampleQuestion;
  foldOf: readonly number[];
}

function shrunkErrors({ cohort, question, foldOf }: FoldedCohort): number[] {
  const { priorSdD = PRIOR_SD_D, expectedSdD = expectedErrorSdD[cohort.origin] } = question;
  return outOfSampleErrors({
    foldOf,
    fit: (places) => shrunkFit(cohort, chosen(cohort.eyes, places), { priorSdD, expectedSdD }),
    errorOf: (value, place) => errorAt(cohort, chosen(cohort.eyes, [place])[0] as CohortEye, value),
  });
}

function shrunkFit(cohort: Cohort, eyes: CohortEye[], options: Required<ShrinkageOptions>): number {
  const { value } = zeroValue(cohort, eyes);
  const errorsD = eyes.map((eye) => errorAt(cohort, eye, value));
  const own = {
    value,
    publishedValue: cohort.publishedValue,
    caseCount: eyes.length,
    sdD: sampleSd(errorsD),
    designEffect: designEffect(
      errorsD,
      eyes.map(({ cluster }) => cluster),
    ),
  };
  return shrunkValue(own, options).value;
}

function tripleErrors(question: OutOfSampleQuestion, foldOf: readonly number[]): number[] {
  return outOfSampleErrors({
    foldOf,
    fit: (places) => {
      const { constants } = fitTriple({ ...question, cases: chosen(question.cases, places) });
      return prepareCohort({ ...question, formula: 'haigis', published: constants });
    },
    errorOf: (cohort, place) =>
      errorAt(cohort, chosen(cohort.eyes, [place])[0] as CohortEye, cohort.publishedValue),
  });
}

function chosen<Item>(items: readonly Item[], places: readonly number[]): Item[] {
  return places.flatMap((place) => items.slice(place, place + 1));
}
