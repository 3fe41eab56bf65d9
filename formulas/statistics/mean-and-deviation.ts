/**
 * Mean and standard deviation — centre and spread of prediction errors.
 *
 * Inputs: values, one unit; at least one for a mean, two for a deviation.
 * Result: the unit of the values (squared for the variance); the sample form with n - 1.
 * Outside the valid range: throws TooFewValuesError for too few values, OutOfRangeError for one that is no number.
 * Source: Wang, Koch, Hill, Abulafia, J Cataract Refract Surg 2017;43:999 [V first page] asks for mean error and standard
 *   deviation; Chan, Golub, LeVeque, Am Stat 1983;37:242-247 (corrected two-pass algorithm) [M].
 * Erratum / variant: divisor n - 1, as in "sample standard deviation"; the certified values of NIST StRD Michelso and
 *   NumAcc4 are reproduced [N].
 */
import { checkValues } from './checks';
import type { Values } from './checks';

export function mean(values: Values): number {
  checkValues('mean', values, 1);
  let sum = 0;
  for (const value of values) sum += value;
  const rough = sum / values.length;
  // What rounding lost in a long sum.
  let rest = 0;
  for (const value of values) rest += value - rough;
  return rough + rest / values.length + 0;
}

export function sampleVariance(values: Values): number {
  checkValues('variance', values, 2);
  const centre = mean(values);
  let squares = 0;
  let rest = 0;
  for (const value of values) {
    const deviation = value - centre;
    squares += deviation * deviation;
    rest += deviation;
  }
  return Math.max(0, (squares - (rest * rest) / values.length) / (values.length - 1));
}

export function sampleSd(values: Values): number {
  return Math.sqrt(sampleVariance(values));
}
