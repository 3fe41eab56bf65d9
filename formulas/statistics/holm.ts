/**
 * Holm's step-down — p-values adjusted for having compared several pairs of formulas.
 *
 * Inputs: pValues, each 0 to 1, in any order.
 * Result: adjusted p-values in the order given, each at least its p and at most 1.
 * Outside the valid range: throws OutOfRangeError for a p beyond 0 to 1.
 * Source: Holm, Scand J Stat 1979;6:65-70 [M]; asked for by Holladay, Wilcox, Koch, Wang, J Cataract Refract Surg
 *   2021;47:65-77 [M].
 * Erratum / variant: holds whatever the dependence between the comparisons; R's p.adjust agrees.
 */
import { checkRange } from '../limits';

export function holmAdjusted(pValues: readonly number[]): number[] {
  for (const pValue of pValues) checkRange('pValue', pValue, { min: 0, max: 1 });
  const ascending = pValues
    .map((pValue, index) => ({ pValue, index }))
    .sort((first, second) => first.pValue - second.pValue);
  const adjusted = new Array<number>(pValues.length).fill(0);
  let largest = 0;
  ascending.forEach(({ pValue, index }, rank) => {
    largest = Math.max(largest, Math.min(1, (pValues.length - rank) * pValue));
    adjusted[index] = largest;
  });
  return adjusted;
}
