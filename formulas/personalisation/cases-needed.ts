/**
 * Cases needed — how many more eyes until the mean error is known to a given half-width.
 *
 * Inputs: sdD, D, of prediction errors; caseCount so far; halfWidthD of the 95 % interval, 0.10 when absent;
 *   designEffect, 1 when absent, larger where both eyes of patients are counted.
 * Result: total and how many are missing, whole eyes.
 * Outside the valid range: throws OutOfRangeError for a deviation or half-width that is not positive.
 * Source: n = (1.96 SD / half-width)^2 [D]: SD 0.44 D needs 75 eyes for 0.10 D and 298 for 0.05 D.
 * Erratum / variant: normal, not Student: below 20 eyes it is a little too hopeful.
 */
import { checkRange } from '../limits';
import { checkCount } from '../statistics/checks';
import { twoSidedNormal } from '../statistics/normal-quantile';

export interface CasesQuestion {
  sdD: number;
  caseCount: number;
  halfWidthD?: number;
  designEffect?: number;
}

export interface CasesNeeded {
  total: number;
  missing: number;
  halfWidthD: number;
}

const POSITIVE_D = { min: 0.001, max: 20 };

export function casesNeeded(question: CasesQuestion): CasesNeeded {
  const { sdD, caseCount, halfWidthD = 0.1, designEffect = 1 } = question;
  checkRange('sdD', sdD, POSITIVE_D);
  checkRange('halfWidthD', halfWidthD, POSITIVE_D);
  checkRange('designEffect', designEffect, { min: 1, max: Number.MAX_SAFE_INTEGER });
  checkCount('caseCount', caseCount, 0);
  const ratio = (twoSidedNormal(0.95) * sdD) / halfWidthD;
  const total = Math.ceil(designEffect * ratio * ratio);
  return { total, missing: Math.max(0, total - caseCount), halfWidthD };
}
