/**
 * Wilson interval — confidence interval for a share of eyes.
 *
 * Inputs: count of eyes within, total of eyes, at least one; confidence, 0.95 when absent; designEffect, 1 when absent,
 *   larger where both eyes of patients are counted.
 * Result: { low, high }, shares from 0 to 1; it always holds count/total and never passes 0 or 1.
 * Outside the valid range: throws OutOfRangeError for a count beyond 0 to total.
 * Source: Wilson, J Am Stat Assoc 1927;22:209-212 [V citation; formula read in an encyclopaedia]; Newcombe, Stat Med
 *   1998;17:857-872 compares seven methods [V citation].
 * Erratum / variant: without continuity correction. With a design effect the total is divided by it: Korn, Graubard,
 *   Surv Methodol 1998;24:193-201 [M].
 */
import { checkRange } from '../limits';
import { checkCount } from './checks';
import { twoSidedNormal } from './normal-quantile';

export interface Interval {
  low: number;
  high: number;
}

export interface ShareCounted {
  count: number;
  total: number;
  confidence?: number;
  designEffect?: number;
}

export function wilsonInterval({
  count,
  total,
  confidence = 0.95,
  designEffect = 1,
}: ShareCounted): Interval {
  checkCount('total', total, 1);
  checkCount('count', count, 0);
  checkRange('count', count, { min: 0, max: total });
  checkRange('designEffect', designEffect, { min: 1, max: total });
  const share = count / total;
  const effective = total / designEffect;
  const z = twoSidedNormal(confidence);
  const square = (z * z) / effective;
  const centre = (share + square / 2) / (1 + square);
  const half = (z * Math.sqrt((share * (1 - share)) / effective + square / (4 * effective))) / (1 + square);
  // At 0 and 1 the interval ends exactly there; rounding must not step over, nor leave the share outside.
  return {
    low: count === 0 ? 0 : Math.max(0, Math.min(share, centre - half)),
    high: count === total ? 1 : Math.min(1, Math.max(share, centre + half)),
  };
}
