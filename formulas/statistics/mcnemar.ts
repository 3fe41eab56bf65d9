/**
 * McNemar's test — whether two formulas bring a different share of the same eyes within a band.
 *
 * Inputs: onlyFirst and onlySecond, eyes within the band with one formula but not with the other.
 * Result: two-sided p, exact and by chi-square with continuity correction, which needs at least one such eye.
 * Outside the valid range: throws OutOfRangeError for a count that is no whole number from 0 on. Without any eye that
 *   differs p is 1.
 * Source: McNemar, Psychometrika 1947;12:153-157; Edwards, Psychometrika 1948;13:185-187 (correction of 1) [M]. The
 *   uncorrected 17.36 of Agresti's approval ratings (86 and 150) was read on a university's teaching page [V].
 * Erratum / variant: the exact p is twice the smaller binomial tail, at most 1. Eyes count as independent: one eye per
 *   patient.
 */
import { checkPairs, checkCount } from './checks';
import { isWithinBand } from './error-summary';
import { chiSquareUpperTail } from './f-and-chi-square';
import { incompleteBeta } from './incomplete-beta';

export interface DiscordantEyes {
  onlyFirst: number;
  onlySecond: number;
}

export interface McNemarResult extends DiscordantEyes {
  exactP: number;
  correctedStatistic: number;
  correctedP: number;
}

export function mcNemarTest({ onlyFirst, onlySecond }: DiscordantEyes): McNemarResult {
  checkCount('onlyFirst', onlyFirst, 0);
  checkCount('onlySecond', onlySecond, 0);
  const total = onlyFirst + onlySecond;
  if (total === 0) return { onlyFirst, onlySecond, exactP: 1, correctedStatistic: 0, correctedP: 1 };
  const excess = Math.max(0, Math.abs(onlyFirst - onlySecond) - 1);
  const correctedStatistic = (excess * excess) / total;
  return {
    onlyFirst,
    onlySecond,
    exactP: Math.min(1, 2 * evenBinomialUpTo(Math.min(onlyFirst, onlySecond), total)),
    correctedStatistic,
    correctedP: chiSquareUpperTail(correctedStatistic, 1),
  };
}

/** The same eyes under two formulas, by their prediction errors. */
export function mcNemarWithin(
  firstErrorsD: readonly number[],
  secondErrorsD: readonly number[],
  bandD: number,
): McNemarResult {
  checkPairs('McNemar', firstErrorsD, secondErrorsD);
  let [onlyFirst, onlySecond] = [0, 0];
  firstErrorsD.forEach((firstErrorD, index) => {
    const isFirst = isWithinBand(firstErrorD, bandD);
    const isSecond = isWithinBand(secondErrorsD[index] ?? NaN, bandD);
    if (isFirst && !isSecond) onlyFirst += 1;
    if (isSecond && !isFirst) onlySecond += 1;
  });
  return mcNemarTest({ onlyFirst, onlySecond });
}

/** At most this many heads in so many throws of a fair coin. */
function evenBinomialUpTo(count: number, total: number): number {
  if (count === total) return 1;
  return incompleteBeta(0.5, { first: total - count, second: count + 1 });
}
