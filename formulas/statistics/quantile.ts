/**
 * Quantile and median — the value below which a given share of the eyes lies.
 *
 * Inputs: values, one unit, in any order; share 0 to 1, ends included.
 * Result: the unit of the values; linear between neighbours, position (n - 1) share.
 * Outside the valid range: throws TooFewValuesError without values, OutOfRangeError for a share beyond 0 to 1.
 * Source: Hyndman, Fan, Am Stat 1996;50:361-365, definition 7 [M]; it is the default of R.
 * Erratum / variant: nine definitions are in use; the median is the same in all that are linear.
 */
import { checkRange } from '../limits';
import { checkValues } from './checks';

export function quantile(values: readonly number[], share: number): number {
  checkValues('quantile', values, 1);
  checkRange('share', share, { min: 0, max: 1 });
  return quantileOfSorted(Float64Array.from(values).sort(), share);
}

export function median(values: readonly number[]): number {
  return quantile(values, 0.5);
}

/** Without checks, for lists that are asked more than once. */
export function quantileOfSorted(sorted: ArrayLike<number>, share: number): number {
  const position = (sorted.length - 1) * share;
  const below = Math.floor(position);
  const lower = sorted[below] ?? NaN;
  const upper = sorted[Math.min(below + 1, sorted.length - 1)] ?? NaN;
  const part = position - below;
  // Written so that two equal neighbours, infinite ones too, give themselves.
  return (part === 0 || lower === upper ? lower : lower + part * (upper - lower)) + 0;
}
