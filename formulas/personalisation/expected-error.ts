/**
 * Expected error — the scatter of prediction errors before any own case is known, and its blend with own cases.
 *
 * Inputs: ownSdD, D; caseCount; expectedSdD, D.
 * Result: D; the root of the mean of both variances, own degrees of freedom against 30 of the expected one.
 * Outside the valid range: throws OutOfRangeError for a count below 1.
 * Source: scaled inverse chi-square prior [D], with the 30 cases from which own results are preferred; optical 0.45 D and
 *   ultrasound 0.66 D (the larger of contact and immersion) as in spread/default-spread [V].
 * Erratum / variant: from 31 own cases they weigh at least as much as the expectation.
 */
import { checkCount } from '../statistics/checks';
import { OWN_RESULTS_FROM_CASES } from '../spread/default-spread';
import type { MeasurementOrigin } from './origin';

export const expectedErrorSdD: Record<MeasurementOrigin, number> = { optical: 0.45, ultrasound: 0.66 };

export interface OwnScatter {
  ownSdD: number;
  caseCount: number;
  expectedSdD: number;
}

export function pooledSdD({ ownSdD, caseCount, expectedSdD }: OwnScatter): number {
  const weight = ownWeight(caseCount);
  return Math.sqrt(weight * ownSdD * ownSdD + (1 - weight) * expectedSdD * expectedSdD);
}

/** Share of the own variance in the blend. */
export function ownWeight(caseCount: number): number {
  checkCount('caseCount', caseCount, 1);
  const degreesOfFreedom = caseCount - 1;
  return degreesOfFreedom / (degreesOfFreedom + OWN_RESULTS_FROM_CASES);
}
