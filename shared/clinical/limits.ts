/**
 * Comparing a measured value with a limit. Keratometry comes from radii and sums come from parts, so a value that
 * stands exactly on its limit may be off by what binary fractions leave; that is never a finding.
 */

/** Far below any digit that a device gives. */
const NOISE = 1e-6;

export const isAbove = (value: number, limit: number): boolean => value > limit + NOISE;
export const isBelow = (value: number, limit: number): boolean => value < limit - NOISE;
export const isAtLeast = (value: number, limit: number): boolean => value >= limit - NOISE;

export interface Band {
  low: number;
  high: number;
}

/** Inside when it stands on either end. */
export const isOutside = (value: number, { low, high }: Band): boolean =>
  isBelow(value, low) || isAbove(value, high);

export const fixed = (value: number, decimals = 2): string => value.toFixed(decimals);

/** With as many decimals as it takes not to read like the limit that it passed. */
export function passing(value: number, limits: readonly number[], decimals = 2): string {
  const isHidden = (digits: number): boolean =>
    limits.some((limit) => fixed(value, digits) === fixed(limit, digits));
  let digits = decimals;
  while (digits < MOST_DECIMALS && isHidden(digits)) digits += 1;
  return fixed(value, digits);
}

const MOST_DECIMALS = 4;
