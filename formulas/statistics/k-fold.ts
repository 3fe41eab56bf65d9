/**
 * Out-of-sample error by folds — every eye is judged by a fit that has not seen it, nor its fellow eye.
 *
 * Inputs: clusters, the patient of each eye; foldCount, at least 2; seed; a fit on some eyes and an error of one eye.
 * Result: foldOf: for each eye its fold; outOfSample: for each eye its error.
 * Outside the valid range: throws TooFewValuesError for fewer patients than folds, OutOfRangeError for fewer than two
 *   folds.
 * Source: Stone, J R Stat Soc B 1974;36:111-147 (cross-validation) [M].
 * Erratum / variant: patients are dealt in turn from a shuffled pack (Fisher and Yates), so folds differ by at most one
 *   patient. Another seed divides differently and moves the result a little.
 */
import { randomFromSeed } from '../solvers/random';
import { checkCount } from './checks';
import { TooFewValuesError } from './errors';
import type { Cluster } from './clustered-mean';

export interface FoldDivision {
  clusters: readonly Cluster[];
  foldCount: number;
  seed: number;
}

export function foldOfEach({ clusters, foldCount, seed }: FoldDivision): number[] {
  checkCount('foldCount', foldCount, 2);
  const pack = shuffled([...new Set(clusters)], seed);
  if (pack.length < foldCount) throw new TooFewValuesError('folds: patients', pack.length, foldCount);
  const foldOf = new Map(pack.map((cluster, place) => [cluster, place % foldCount]));
  return clusters.map((cluster) => foldOf.get(cluster) ?? 0);
}

export interface FoldedFit<Model> {
  foldOf: readonly number[];
  /** Eyes by their place in the list. */
  fit(trainingEyes: readonly number[]): Model;
  errorOf(model: Model, eye: number): number;
}

export function outOfSampleErrors<Model>({ foldOf, fit, errorOf }: FoldedFit<Model>): number[] {
  const errors = new Array<number>(foldOf.length).fill(0);
  for (const fold of new Set(foldOf)) {
    const training: number[] = [];
    const held: number[] = [];
    foldOf.forEach((own, eye) => (own === fold ? held : training).push(eye));
    const model = fit(training);
    for (const eye of held) errors[eye] = errorOf(model, eye) + 0;
  }
  return errors;
}

/** One eye of each patient, chosen by the seed: for tests that take eyes as independent. Places in the list. */
export function oneEyePerPatient(clusters: readonly Cluster[], seed: number): number[] {
  const random = randomFromSeed(seed);
  const eyesOf = new Map<Cluster, number[]>();
  clusters.forEach((cluster, eye) => eyesOf.set(cluster, [...(eyesOf.get(cluster) ?? []), eye]));
  const chosen = [...eyesOf.values()].map((eyes) => eyes[random.integerBelow(eyes.length)] ?? 0);
  return chosen.sort((first, second) => first - second);
}

function shuffled<Item>(items: Item[], seed: number): Item[] {
  const random = randomFromSeed(seed);
  for (let place = items.length - 1; place > 0; place -= 1) {
    const other = random.integerBelow(place + 1);
    [items[place], items[other]] = [items[other] as Item, items[place] as Item];
  }
  return items;
}
