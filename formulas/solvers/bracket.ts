/**
 * Widening bracket — two points round a start at which a function has different signs.
 *
 * Inputs: a function of one number; start and first step in its unit; the limits that the bracket may not pass.
 * Result: { low, high } for findRoot.
 * Outside the valid range: throws DivergedError when both limits are reached without a sign change.
 * Source: the step is doubled on both sides until the sign changes [D].
 * Erratum / variant: starting near the root keeps the function away from points where it is not defined.
 */
import { DivergedError } from './diverged-error';

export interface BracketSearch {
  start: number;
  step: number;
  limits: { min: number; max: number };
}

export function findBracket(
  valueAt: (at: number) => number,
  { start, step, limits }: BracketSearch,
): { low: number; high: number } {
  let width = step;
  for (let widenings = 0; ; widenings += 1) {
    const low = Math.max(limits.min, start - width);
    const high = Math.min(limits.max, start + width);
    const [atLow, atHigh] = [valueAt(low), valueAt(high)];
    if (Number.isNaN(atLow) || Number.isNaN(atHigh)) throw new DivergedError('not a number', widenings);
    if (atLow === 0 || atHigh === 0 || atLow > 0 !== atHigh > 0) return { low, high };
    if (low === limits.min && high === limits.max) throw new DivergedError('no sign change', widenings);
    width *= 2;
  }
}
