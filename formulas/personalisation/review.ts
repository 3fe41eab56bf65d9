/**
 * Cases to review — errors so large that wrong lens, wrong eye or a slip of typing come before biology.
 *
 * Inputs: errorsD, D, with the constants in force.
 * Result: places in the list with their error and why: beyond 2 D, or beyond 3 standard deviations of the list.
 * Outside the valid range: an empty list gives none; below three values no deviation is judged.
 * Source: common practice [CP].
 * Erratum / variant: nothing is dropped: a case leaves the analysis only after a person has looked at it. The list's own
 *   deviation holds the large errors too, so few cases rarely pass 3.
 */
import { mean, sampleSd } from '../statistics/mean-and-deviation';

export type ReviewReason = 'beyond 2 D' | 'beyond 3 SD';

export interface CaseToReview {
  caseIndex: number;
  errorD: number;
  reasons: ReviewReason[];
}

const LARGE_D = 2;
const FAR_SD = 3;

export function casesToReview(errorsD: readonly number[]): CaseToReview[] {
  const isJudged = errorsD.length >= 3;
  const centre = isJudged ? mean(errorsD) : 0;
  const limit = isJudged ? FAR_SD * sampleSd(errorsD) : Infinity;
  return errorsD.flatMap((errorD, caseIndex) => {
    const reasons: ReviewReason[] = [];
    if (Math.abs(errorD) > LARGE_D) reasons.push('beyond 2 D');
    if (Math.abs(errorD - centre) > limit) reasons.push('beyond 3 SD');
    return reasons.length === 0 ? [] : [{ caseIndex, errorD, reasons }];
  });
}
