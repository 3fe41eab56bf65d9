/**
 * F and chi-square — tails and quantiles for ellipses, counts and scatter.
 *
 * Inputs: f or chiSquare, not negative; degrees of freedom, positive; share strictly between 0 and 1.
 * Result: probability of a value at least as large; quantile.
 * Outside the valid range: throws OutOfRangeError.
 * Source: by the incomplete beta and gamma functions, NIST Digital Library of Mathematical Functions, 8.17 and 8.2 [M];
 *   quantiles by a bracketed root [D].
 * Erratum / variant: none; R agrees to 1e-9.
 */
import { checkRange } from '../limits';
import { findBracket } from '../solvers/bracket';
import { findRoot } from '../solvers/root';
import { checkShare } from './checks';
import { incompleteBeta } from './incomplete-beta';
import { upperIncompleteGamma } from './incomplete-gamma';

export interface FreedomPair {
  numerator: number;
  denominator: number;
}

const NOT_NEGATIVE = { min: 0, max: Number.MAX_VALUE };
const FREEDOM = { min: Number.MIN_VALUE, max: Number.MAX_VALUE };

export function fUpperTail(f: number, { numerator, denominator }: FreedomPair): number {
  checkRange('f', f, NOT_NEGATIVE);
  checkRange('numerator', numerator, FREEDOM);
  checkRange('denominator', denominator, FREEDOM);
  const x = denominator / (denominator + numerator * f);
  return incompleteBeta(x, { first: denominator / 2, second: numerator / 2 });
}

export function chiSquareUpperTail(chiSquare: number, degreesOfFreedom: number): number {
  checkRange('chiSquare', chiSquare, NOT_NEGATIVE);
  checkRange('degreesOfFreedom', degreesOfFreedom, FREEDOM);
  return upperIncompleteGamma(chiSquare / 2, degreesOfFreedom / 2);
}

export function fQuantile(share: number, freedom: FreedomPair): number {
  return positiveQuantile(share, 1, (f) => fUpperTail(f, freedom));
}

export function chiSquareQuantile(share: number, degreesOfFreedom: number): number {
  return positiveQuantile(share, degreesOfFreedom, (chiSquare) =>
    chiSquareUpperTail(chiSquare, degreesOfFreedom),
  );
}

function positiveQuantile(share: number, start: number, upperTail: (value: number) => number): number {
  checkShare('share', share);
  const missAt = (value: number) => upperTail(value) - (1 - share);
  const bracket = findBracket(missAt, { start, step: start, limits: { min: 0, max: 1e12 } });
  return findRoot(missAt, { ...bracket, tolerance: 1e-14 }).value;
}
