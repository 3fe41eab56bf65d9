/**
 * Trimmed mean and Winsorised variance — centre and spread that a few wild eyes do not rule.
 *
 * Inputs: values, one unit; trim, the share cut from each end, 0 to below 0.5; 0.2 when absent.
 * Result: the unit of the values; squared for variance and covariance.
 * Outside the valid range: throws TooFewValuesError below two values, OutOfRangeError for a trim beyond 0 to 0.5.
 * Source: Wilcox, Introduction to Robust Estimation and Hypothesis Testing, Academic Press, ch. 3 [V: the book's published
 *   program]; Holladay, Wilcox, Koch, Wang, J Cataract Refract Surg 2021;47:65-77 recommends 20 % [M].
 * Erratum / variant: floor(trim n) values go from each end; the covariance winsorises each list by itself, in pairs.
 */
import { checkRange } from '../limits';
import { checkPairs, checkValues } from './checks';
import { mean, sampleVariance } from './mean-and-deviation';

export const USUAL_TRIM = 0.2;

const TRIM = { min: 0, max: 0.5 - Number.EPSILON };

export function trimmedMean(values: readonly number[], trim = USUAL_TRIM): number {
  checkValues('trimmed mean', values, 1);
  const cut = trimCount(values.length, trim);
  return mean(sortedCopy(values).slice(cut, values.length - cut));
}

export function winsorisedVariance(values: readonly number[], trim = USUAL_TRIM): number {
  return sampleVariance(winsorised(values, trim));
}

export function winsorisedCovariance(
  first: readonly number[],
  second: readonly number[],
  trim = USUAL_TRIM,
): number {
  checkPairs('Winsorised covariance', first, second);
  checkValues('Winsorised covariance', first, 2);
  const [ofFirst, ofSecond] = [winsorised(first, trim), winsorised(second, trim)];
  const [centreOfFirst, centreOfSecond] = [mean(ofFirst), mean(ofSecond)];
  let products = 0;
  ofFirst.forEach((value, index) => {
    products += (value - centreOfFirst) * ((ofSecond[index] ?? NaN) - centreOfSecond);
  });
  return products / (first.length - 1);
}

/** How many values are cut from each end. */
export function trimCount(count: number, trim: number): number {
  checkRange('trim', trim, TRIM);
  return Math.floor(trim * count);
}

/** In the order given, with both ends drawn in to the last values that a trimmed mean keeps. */
function winsorised(values: readonly number[], trim: number): number[] {
  checkValues('Winsorised variance', values, 2);
  const cut = trimCount(values.length, trim);
  const sorted = sortedCopy(values);
  const [low, high] = [sorted[cut] ?? NaN, sorted[values.length - 1 - cut] ?? NaN];
  return values.map((value) => Math.min(high, Math.max(low, value)));
}

function sortedCopy(values: readonly number[]): number[] {
  return [...values].sort((first, second) => first - second);
}
