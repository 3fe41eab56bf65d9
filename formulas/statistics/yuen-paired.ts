/**
 * Yuen's paired test — whether two formulas differ in their (absolute) errors in the same eyes, by trimmed means.
 *
 * Inputs: first and second, one unit, eye by eye; trim, 0.2 when absent; confidence, 0.95 when absent.
 * Result: difference of the trimmed means (first minus second) with standard error, interval, t, degrees of freedom
 *   and two-sided p.
 * Outside the valid range: throws TooFewValuesError where fewer than two eyes are left after trimming,
 *   DegenerateDataError where the Winsorised differences do not scatter.
 * Source: Yuen, Biometrika 1974;61:165-170 [V citation]; the form for dependent groups: Wilcox, Introduction to Robust
 *   Estimation and Hypothesis Testing, Academic Press, ch. 5 [V: the book's published program].
 * Erratum / variant: compares the two trimmed means, not the trimmed mean of the differences; both exist and differ.
 *   Eyes count as independent: one eye per patient.
 */
import { DegenerateDataError, TooFewValuesError } from './errors';
import { checkPairs, checkShare, checkValues } from './checks';
import { studentTwoSided, twoSidedStudent } from './student-t';
import { trimCount, trimmedMean, USUAL_TRIM, winsorisedCovariance, winsorisedVariance } from './trimmed';
import type { Interval } from './wilson-interval';

export interface PairedTest {
  difference: number;
  standardError: number;
  statistic: number;
  degreesOfFreedom: number;
  pValue: number;
  interval: Interval;
}

export function yuenPairedTest(
  first: readonly number[],
  second: readonly number[],
  { trim = USUAL_TRIM, confidence = 0.95 }: { trim?: number; confidence?: number } = {},
): PairedTest {
  checkPairs('Yuen', first, second);
  checkValues('Yuen', first, 2);
  checkValues('Yuen', second, 2);
  checkShare('confidence', confidence);
  const left = first.length - 2 * trimCount(first.length, trim); // h
  if (left < 2) throw new TooFewValuesError('Yuen: eyes left after trimming', left, 2);
  const variance = // of x plus of y minus twice their covariance
    winsorisedVariance(first, trim) +
    winsorisedVariance(second, trim) -
    2 * winsorisedCovariance(first, second, trim);
  const standardError = Math.sqrt(((first.length - 1) * Math.max(0, variance)) / (left * (left - 1)));
  if (standardError === 0) throw new DegenerateDataError('Yuen', 'the differences do not scatter');
  const difference = trimmedMean(first, trim) - trimmedMean(second, trim) + 0;
  const degreesOfFreedom = left - 1;
  const half = twoSidedStudent(confidence, degreesOfFreedom) * standardError;
  const statistic = difference / standardError;
  return {
    difference,
    standardError,
    statistic,
    degreesOfFreedom,
    pValue: studentTwoSided(statistic, degreesOfFreedom),
    interval: { low: difference - half + 0, high: difference + half + 0 },
  };
}
