/**
 * Student's t — intervals and tests for means with an estimated standard deviation.
 *
 * Inputs: t; degrees of freedom, positive; share strictly between 0 and 1.
 * Result: probability up to t; two-sided tail; quantile. Relative error of the tail below 1e-10.
 * Outside the valid range: throws OutOfRangeError.
 * Source: Student, Biometrika 1908;6:1-25; by the incomplete beta function, NIST Digital Library of Mathematical
 *   Functions, 8.17 [M]; quantiles by a bracketed root [D].
 * Erratum / variant: the table of the NIST/SEMATECH e-Handbook of Statistical Methods is reproduced to its three decimals [N].
 */
import { checkRange } from '../limits';
import { findBracket } from '../solvers/bracket';
import { findRoot } from '../solvers/root';
import { checkShare } from './checks';
import { incompleteBeta } from './incomplete-beta';

const FREEDOM = { min: Number.MIN_VALUE, max: Number.MAX_VALUE };

/** Probability of a t at least this far from zero, either way. */
export function studentTwoSided(t: number, degreesOfFreedom: number): number {
  checkRange('degreesOfFreedom', degreesOfFreedom, FREEDOM);
  const x = degreesOfFreedom / (degreesOfFreedom + t * t);
  return incompleteBeta(x, { first: degreesOfFreedom / 2, second: 0.5 });
}

export function studentCdf(t: number, degreesOfFreedom: number): number {
  const tail = studentTwoSided(t, degreesOfFreedom) / 2;
  return t > 0 ? 1 - tail : tail;
}

export function studentQuantile(share: number, degreesOfFreedom: number): number {
  checkShare('share', share);
  if (share === 0.5) return 0;
  if (share < 0.5) return -studentQuantile(1 - share, degreesOfFreedom);
  return twoSidedStudent(2 * share - 1, degreesOfFreedom);
}

/** 2.228 for 0.95 and 10: the half-width of a two-sided interval in standard errors. */
export function twoSidedStudent(confidence: number, degreesOfFreedom: number): number {
  checkShare('confidence', confidence);
  // In the logarithm the tail is nearly straight, so a wide bracket costs few steps.
  const missAt = (t: number) => Math.log(studentTwoSided(t, degreesOfFreedom)) - Math.log(1 - confidence);
  const bracket = findBracket(missAt, { start: 2, step: 2, limits: { min: 0, max: 1e9 } });
  return findRoot(missAt, { ...bracket, tolerance: 1e-13 }).value;
}
