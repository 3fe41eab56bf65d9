/**
 * Mean and median absolute error — how far the eyes land from the prediction, whichever way.
 *
 * Inputs: errorsD, D, achieved minus predicted.
 * Result: D, not negative.
 * Outside the valid range: throws TooFewValuesError without values, OutOfRangeError for one that is no number.
 * Source: Hoffer et al., Am J Ophthalmol 2015;160:1086 [V first part]: compare the median absolute error; Wang, Koch, Hill,
 *   Abulafia, J Cataract Refract Surg 2017;43:999 [V first page]: report both.
 * Erratum / variant: both say little where the mean error is not zero; they are shown beside it.
 */
import { checkValues } from './checks';
import { mean } from './mean-and-deviation';
import { median } from './quantile';

export function meanAbsoluteError(errorsD: readonly number[]): number {
  checkValues('mean absolute error', errorsD, 1);
  return mean(errorsD.map(Math.abs));
}

export function medianAbsoluteError(errorsD: readonly number[]): number {
  checkValues('median absolute error', errorsD, 1);
  return median(errorsD.map(Math.abs));
}
