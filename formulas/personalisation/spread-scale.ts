/**
 * Spread scale — by how much the predicted spread of landings is too narrow or too wide for this practice.
 *
 * Inputs: outcomes, each with its prediction error and the standard deviation that was predicted for that eye, D.
 * Result: factor for the predicted standard deviations; the factor of the own cases alone; their weight in it; 95 % credible
 *   interval of the factor.
 * Outside the valid range: throws TooFewValuesError below two outcomes, OutOfRangeError for a predicted deviation that
 *   is not positive.
 * Source: standard deviation of error over predicted deviation, blended with a factor of 1 worth 30 cases (scaled inverse
 *   chi-square prior [D]); own results are preferred from 30 cases on [CP].
 * Erratum / variant: an offset common to all eyes is not spread: it belongs to the constant and is taken out. The
 *   interval takes errors as normal and eyes as independent.
 */
import { checkRange } from '../limits';
import { OWN_RESULTS_FROM_CASES } from '../spread/default-spread';
import { chiSquareQuantile } from '../statistics/f-and-chi-square';
import { sampleSd } from '../statistics/mean-and-deviation';
import { ownWeight, pooledSdD } from './expected-error';
import type { Spread } from '../spread/spread';
import type { Interval } from '../statistics/wilson-interval';

export interface SpreadOutcome {
  errorD: number;
  predictedSdD: number;
}

export interface SpreadScale {
  factor: number;
  ownFactor: number;
  weightOfOwn: number;
  caseCount: number;
  interval: Interval;
}

const PREDICTED_SD_D = { min: 0.01, max: 10 };

export function spreadScaleOf(outcomes: readonly SpreadOutcome[]): SpreadScale {
  for (const { predictedSdD } of outcomes) checkRange('predictedSdD', predictedSdD, PREDICTED_SD_D);
  const ownFactor = sampleSd(outcomes.map(({ errorD, predictedSdD }) => errorD / predictedSdD));
  const caseCount = outcomes.length;
  const factor = pooledSdD({ ownSdD: ownFactor, caseCount, expectedSdD: 1 });
  const degreesOfFreedom = caseCount - 1 + OWN_RESULTS_FROM_CASES;
  const end = (share: number) =>
    factor * Math.sqrt(degreesOfFreedom / chiSquareQuantile(share, degreesOfFreedom));
  return {
    factor,
    ownFactor,
    weightOfOwn: ownWeight(caseCount),
    caseCount,
    interval: { low: end(0.975), high: end(0.025) },
  };
}

/** The same parts, every one wider or narrower by the factor; factors of two calls multiply. */
export function scaledSpread(spread: Spread, factor: number): Spread {
  return { ...spread, scale: (spread.scale ?? 1) * factor };
}
