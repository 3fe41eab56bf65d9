/**
 * Paired comparison of standard deviations — whether two formulas scatter differently in the same eyes.
 *
 * Inputs: first and second, one unit, eye by eye: prediction errors of two formulas.
 * Result: both standard deviations, correlation of difference and sum (positive: the first scatters more), t, degrees
 *   of freedom (n - 2) and two-sided p.
 * Outside the valid range: throws TooFewValuesError below four eyes, DegenerateDataError where difference or sum does
 *   not scatter, where both lie on one line, or where the formulas differ in a single eye.
 * Source: Wilcox, Comparing the variances of two dependent variables, J Stat Distrib Appl 2015;2:7 [V abstract and
 *   introduction; its published program read]; Morgan, Biometrika 1939;31:13-19; Pitman, Biometrika 1939;31:9-12;
 *   Cribari-Neto, Comput Stat Data Anal 2004;45:215-233 (HC4) [M].
 * Erratum / variant: the sum is regressed on the difference, as in Wilcox's program; the other way round gives a
 *   slightly different p. Without HC4 the test is unreliable for heavy tails, which prediction errors have. Whether Holladay,
 *   Wilcox, Koch, Wang, J Cataract Refract Surg 2021;47:65-77 uses this or a bootstrap could not be read [M]. Eyes count
 *   as independent: one eye per patient.
 */
import { DegenerateDataError } from './errors';
import { checkPairs, checkValues } from './checks';
import { mean, sampleSd } from './mean-and-deviation';
import { studentTwoSided } from './student-t';

export interface DeviationComparison {
  firstSd: number;
  secondSd: number;
  correlation: number;
  statistic: number;
  degreesOfFreedom: number;
  pValue: number;
}

const NAME = 'paired comparison of standard deviations';

export function comparePairedDeviations(
  first: readonly number[],
  second: readonly number[],
): DeviationComparison {
  checkPairs(NAME, first, second);
  checkValues(NAME, first, 4);
  checkValues(NAME, second, 4);
  const differences = standardised(first.map((value, index) => value - (second[index] ?? NaN))); // V
  const sums = standardised(first.map((value, index) => value + (second[index] ?? NaN))); // U
  const { slope, standardError } = slopeWithHc4(differences, sums);
  const degreesOfFreedom = first.length - 2;
  const statistic = slope / standardError;
  return {
    firstSd: sampleSd(first),
    secondSd: sampleSd(second),
    correlation: slope + 0,
    statistic: statistic + 0,
    degreesOfFreedom,
    pValue: studentTwoSided(statistic, degreesOfFreedom),
  };
}

/** Mean 0, SD 1: the slope between two such lists is their correlation. */
function standardised(values: readonly number[]): number[] {
  const [centre, sd] = [mean(values), sampleSd(values)];
  // Differences of equal numbers leave rounding, which is no scatter.
  const size = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  if (!(sd > 1e-12 * size)) throw new DegenerateDataError(NAME, 'the errors of the formulas move together');
  return values.map((value) => (value - centre) / sd);
}

/** Least squares of y on x, both standardised, with the HC4 standard error of the slope. */
function slopeWithHc4(x: readonly number[], y: readonly number[]): { slope: number; standardError: number } {
  const count = x.length;
  const squares = count - 1; // of a standardised list
  const slope = x.reduce((sum, at, index) => sum + at * (y[index] ?? NaN), 0) / squares;
  let variance = 0;
  x.forEach((at, index) => {
    const leverage = 1 / count + (at * at) / squares; // h
    if (leverage > 1 - 1e-9) throw new DegenerateDataError(NAME, 'the formulas differ in a single eye');
    const discount = Math.min(4, (count * leverage) / 2); // the leverages add up to 2
    const residual = (y[index] ?? NaN) - slope * at;
    variance += (at * at * residual * residual) / Math.pow(1 - leverage, discount);
  });
  const standardError = Math.sqrt(variance) / squares;
  if (!(standardError > 1e-12)) throw new DegenerateDataError(NAME, 'difference and sum lie on one line');
  return { slope, standardError };
}
