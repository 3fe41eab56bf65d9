/**
 * Pairwise comparison — every formula against every other in the same eyes, with p-values adjusted for their number.
 *
 * Inputs: lists, by name, of one value per eye in one order; a test that gives a p-value for two of them.
 * Result: one row per pair with p and adjusted p.
 * Outside the valid range: what the test throws.
 * Source: Holm, Scand J Stat 1979;6:65-70 [M].
 * Erratum / variant: three formulas are three comparisons, five are ten; all of them count, also those not shown.
 */
import { holmAdjusted } from './holm';

export interface PairComparison<Name extends string> {
  first: Name;
  second: Name;
  pValue: number;
  adjustedP: number;
}

export function comparePairwise<Name extends string, Value>(
  lists: readonly { name: Name; values: readonly Value[] }[],
  pValueOf: (first: readonly Value[], second: readonly Value[]) => number,
): PairComparison<Name>[] {
  const pairs = lists.flatMap((first, index) =>
    lists.slice(index + 1).map((second) => ({
      first: first.name,
      second: second.name,
      pValue: pValueOf(first.values, second.values),
    })),
  );
  const adjusted = holmAdjusted(pairs.map(({ pValue }) => pValue));
  return pairs.map((pair, index) => ({ ...pair, adjustedP: adjusted[index] ?? NaN }));
}
