/**
 * Bootstrap intervals — confidence without a formula for the standard error.
 *
 * Inputs: items, what is resampled: eyes, pairs of errors, or whole patients; a statistic of such a sample; resamples,
 *   2000 when absent; confidence, 0.95 when absent; seed.
 * Result: percentile: quantiles of the resampled statistic. Bootstrap-t of a trimmed mean: symmetric about it.
 * Outside the valid range: throws TooFewValuesError for too few items; bootstrap-t throws DegenerateDataError where too
 *   many resamples do not scatter.
 * Source: Efron, Tibshirani, An Introduction to the Bootstrap, Chapman and Hall 1993, ch. 12 and 13 [M]; Wilcox,
 *   Introduction to Robust Estimation and Hypothesis Testing, Academic Press, ch. 4 (symmetric bootstrap-t) [M].
 * Erratum / variant: quantiles of type 7. The seed makes an interval reproducible; another seed moves its ends a little.
 */
import { randomFromSeed } from '../solvers/random';
import { DegenerateDataError, TooFewValuesError } from './errors';
import { checkCount, checkShare, checkValues } from './checks';
import { mean, sampleVariance } from './mean-and-deviation';
import { quantileOfSorted } from './quantile';
import { trimCount, USUAL_TRIM } from './trimmed';
import type { Interval } from './wilson-interval';

export interface BootstrapOptions {
  seed: number;
  resamples?: number;
  confidence?: number;
}

const RESAMPLES = 2000;

export function bootstrapPercentile<Item>(
  items: readonly Item[],
  statistic: (sample: readonly Item[]) => number,
  options: BootstrapOptions,
): Interval {
  if (items.length < 2) throw new TooFewValuesError('bootstrap', items.length, 2);
  const sorted = resampled(items, statistic, options);
  const tail = (1 - (options.confidence ?? 0.95)) / 2;
  return { low: quantileOfSorted(sorted, tail), high: quantileOfSorted(sorted, 1 - tail) };
}

/** Interval for the trimmed mean of differences, or of errors. */
export function bootstrapTrimmedMean(
  values: readonly number[],
  { trim = USUAL_TRIM, ...options }: BootstrapOptions & { trim?: number },
): Interval {
  checkValues('bootstrap-t', values, 5);
  const { centre, standardError } = trimmedCentre(values, trim);
  if (standardError === 0) throw new DegenerateDataError('bootstrap-t', 'the values do not scatter');
  const distance = (sample: readonly number[]) => {
    const drawn = trimmedCentre(sample, trim);
    const off = Math.abs(drawn.centre - centre);
    // A sample that does not scatter is infinitely far off, unless it hits the centre: the cautious reading.
    return off === 0 ? 0 : off / drawn.standardError;
  };
  const sorted = resampled(values, distance, options);
  const half = quantileOfSorted(sorted, options.confidence ?? 0.95) * standardError;
  if (!Number.isFinite(half)) {
    throw new DegenerateDataError('bootstrap-t', 'too many resamples do not scatter');
  }
  return { low: centre - half + 0, high: centre + half + 0 };
}

/** Trimmed mean with its standard error from the Winsorised variance; one sort for both. */
function trimmedCentre(values: readonly number[], trim: number): { centre: number; standardError: number } {
  const count = values.length;
  const cut = trimCount(count, trim);
  const left = count - 2 * cut;
  const sorted = Float64Array.from(values).sort();
  const centre = mean(sorted.subarray(cut, count - cut));
  sorted.fill(sorted[cut] ?? NaN, 0, cut).fill(sorted[count - 1 - cut] ?? NaN, count - cut);
  const variance = sampleVariance(sorted);
  return { centre, standardError: Math.sqrt(((count - 1) * variance) / (left * (left - 1))) };
}

function resampled<Item>(
  items: readonly Item[],
  statistic: (sample: readonly Item[]) => number,
  { seed, resamples = RESAMPLES, confidence = 0.95 }: BootstrapOptions,
): Float64Array {
  checkShare('confidence', confidence);
  checkCount('resamples', resamples, 100);
  const random = randomFromSeed(seed);
  const sample = items.slice();
  const results = new Float64Array(resamples);
  for (let round = 0; round < resamples; round += 1) {
    for (let place = 0; place < sample.length; place += 1) {
      sample[place] = items[random.integerBelow(items.length)] as Item;
    }
    results[round] = statistic(sample);
  }
  return results.sort();
}
