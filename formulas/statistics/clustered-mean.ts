/**
 * Clustered mean — mean with a standard error that knows which eyes belong to one patient.
 *
 * Inputs: values, one unit; clusters, for each value the patient it belongs to; confidence, 0.95 when absent.
 * Result: mean, standard error and Student interval with (patients - 1) degrees of freedom.
 * Outside the valid range: throws TooFewValuesError for fewer than two patients, UnequalLengthsError.
 * Source: Liang, Zeger, Biometrika 1986;73:13-22 (sandwich estimator) [M], with the factor G/(G - 1) for G patients.
 * Erratum / variant: with one eye per patient it is exactly SD/sqrt(n) and Student's interval. Each eye counts the same.
 *   Armstrong, Ophthalmic Physiol Opt (guidelines on one or both eyes) [V review]: both eyes must not be pooled as if
 *   independent.
 */
import { checkPairs, checkShare, checkValues } from './checks';
import { TooFewValuesError } from './errors';
import { mean } from './mean-and-deviation';
import { twoSidedStudent } from './student-t';
import type { Interval } from './wilson-interval';

export type Cluster = string | number;

export interface ClusteredMean {
  mean: number;
  standardError: number;
  degreesOfFreedom: number;
  clusterCount: number;
  interval: Interval;
}

export function clusteredMean(
  values: readonly number[],
  clusters: readonly Cluster[],
  confidence = 0.95,
): ClusteredMean {
  checkShare('confidence', confidence);
  const { centre, variance, clusterCount } = clusterVariance(values, clusters);
  const standardError = Math.sqrt(variance);
  const degreesOfFreedom = clusterCount - 1;
  const half = twoSidedStudent(confidence, degreesOfFreedom) * standardError;
  return {
    mean: centre,
    standardError,
    degreesOfFreedom,
    clusterCount,
    interval: { low: centre - half + 0, high: centre + half + 0 },
  };
}

/**
 * Variance of the mean over what it would be if all eyes were independent; never below 1. Where all values are
 * equal nothing can be said, and the largest possible effect is given.
 */
export function designEffect(values: readonly number[], clusters: readonly Cluster[]): number {
  const { centre, variance, sizes } = clusterVariance(values, clusters);
  const count = values.length;
  let squares = 0;
  for (const value of values) squares += (value - centre) * (value - centre);
  if (squares === 0) {
    let sumOfSquaredSizes = 0;
    for (const size of sizes) sumOfSquaredSizes += size * size;
    return sumOfSquaredSizes / count;
  }
  return Math.max(1, variance / (squares / (count * (count - 1))));
}

function clusterVariance(values: readonly number[], clusters: readonly Cluster[]) {
  checkValues('clustered mean', values, 2);
  checkPairs('clustered mean', values, clusters);
  const centre = mean(values);
  const sums = new Map<Cluster, { sum: number; size: number }>();
  values.forEach((value, index) => {
    const cluster = clusters[index] ?? index;
    const before = sums.get(cluster) ?? { sum: 0, size: 0 };
    sums.set(cluster, { sum: before.sum + value - centre, size: before.size + 1 });
  });
  const clusterCount = sums.size;
  if (clusterCount < 2) throw new TooFewValuesError('clustered mean: patients', clusterCount, 2);
  let squares = 0;
  const sizes: number[] = [];
  for (const { sum, size } of sums.values()) {
    squares += sum * sum;
    sizes.push(size);
  }
  const variance = ((clusterCount / (clusterCount - 1)) * squares) / (values.length * values.length);
  return { centre, variance, clusterCount, sizes };
}
