/**
 * Normal quantile — how many standard deviations a given share lies below.
 *
 * Inputs: share, strictly between 0 and 1.
 * Result: standard deviations; the root of the distribution function to 1e-13.
 * Outside the valid range: throws OutOfRangeError.
 * Source: the inverse of spread/normal by a bracketed root [D].
 * Erratum / variant: no table of coefficients is recalled for it; R agrees to 1e-12 between 1e-10 and its complement.
 */
import { findRoot } from '../solvers/root';
import { normalCdf } from '../spread/normal';
import { checkShare } from './checks';

export function normalQuantile(share: number): number {
  checkShare('share', share);
  if (share > 0.5) return -normalQuantile(1 - share);
  return findRoot((z) => normalCdf(z) - share, { low: -9, high: 0, tolerance: 1e-14 }).value;
}

/** 1.96 for 0.95: the half-width of a two-sided interval in standard errors. */
export function twoSidedNormal(confidence: number): number {
  checkShare('confidence', confidence);
  return normalQuantile((1 + confidence) / 2);
}
