/**
 * Fit by two measurements — weighted least squares of one number on two others, with errors that know about patients.
 *
 * Inputs: rows, each with the two measurements, the number to be explained, a positive weight and the patient.
 * Result: intercept, both slopes, and the standard errors of the slopes.
 * Outside the valid range: throws TooFewValuesError below five rows or two patients, DegenerateDataError where the two
 *   measurements do not vary, or only together.
 * Source: normal equations about the weighted means [D]; Liang, Zeger, Biometrika 1986;73:13-22 (sandwich estimator) [M],
 *   with the factors G/(G - 1) and (n - 1)/(n - 3) for G patients and n rows.
 * Erratum / variant: the factors are those of R's vcovCL with HC1, which agrees.
 */
import { checkRange } from '../limits';
import { checkValues } from './checks';
import { DegenerateDataError, TooFewValuesError } from './errors';
import type { Cluster } from './clustered-mean';

export interface FitRow {
  first: number;
  second: number;
  explained: number;
  weight: number;
  cluster: Cluster;
}

export interface TwoRegressorFit {
  intercept: number;
  firstSlope: number;
  secondSlope: number;
  firstStandardError: number;
  secondStandardError: number;
}

const NAME = 'fit by two measurements';
const POSITIVE = { min: Number.MIN_VALUE, max: Number.MAX_VALUE };

/** Sums of squares and products about the weighted means. */
interface Moments {
  first: number;
  second: number;
  explained: number;
  firstFirst: number;
  firstSecond: number;
  secondSecond: number;
  firstExplained: number;
  secondExplained: number;
  determinant: number;
}

export function fitTwoRegressors(rows: readonly FitRow[]): TwoRegressorFit {
  if (rows.length < 5) throw new TooFewValuesError(NAME, rows.length, 5);
  for (const { first, second, explained, weight } of rows) {
    checkValues(NAME, [first, second, explained], 3);
    checkRange('weight', weight, POSITIVE);
  }
  const m = momentsOf(rows);
  const firstSlope = (m.secondSecond * m.firstExplained - m.firstSecond * m.secondExplained) / m.determinant;
  const secondSlope = (m.firstFirst * m.secondExplained - m.firstSecond * m.firstExplained) / m.determinant;
  const intercept = m.explained - firstSlope * m.first - secondSlope * m.second;
  return { intercept, firstSlope, secondSlope, ...slopeErrors(rows, m, [firstSlope, secondSlope]) };
}

function momentsOf(rows: readonly FitRow[]): Moments {
  let [weights, first, second, explained] = [0, 0, 0, 0];
  for (const row of rows) {
    weights += row.weight;
    first += row.weight * row.first;
    second += row.weight * row.second;
    explained += row.weight * row.explained;
  }
  const m = { first: first / weights, second: second / weights, explained: explained / weights };
  let [firstFirst, firstSecond, secondSecond, firstExplained, secondExplained] = [0, 0, 0, 0, 0];
  for (const row of rows) {
    const [byFirst, bySecond] = [row.first - m.first, row.second - m.second];
    const byExplained = row.explained - m.explained;
    firstFirst += row.weight * byFirst * byFirst;
    firstSecond += row.weight * byFirst * bySecond;
    secondSecond += row.weight * bySecond * bySecond;
    firstExplained += row.weight * byFirst * byExplained;
    secondExplained += row.weight * bySecond * byExplained;
  }
  const determinant = firstFirst * secondSecond - firstSecond * firstSecond;
  if (!(determinant > 1e-10 * firstFirst * secondSecond)) {
    throw new DegenerateDataError(NAME, 'the two measurements do not vary, or only together');
  }
  return { ...m, firstFirst, firstSecond, secondSecond, firstExplained, secondExplained, determinant };
}

/** The sandwich: inverse moments round the scatter of the patients' sums of weighted residuals. */
function slopeErrors(rows: readonly FitRow[], m: Moments, [firstSlope, secondSlope]: [number, number]) {
  const sums = new Map<Cluster, [number, number]>();
  for (const row of rows) {
    const [byFirst, bySecond] = [row.first - m.first, row.second - m.second];
    const residual = row.explained - m.explained - firstSlope * byFirst - secondSlope * bySecond;
    const [ofFirst, ofSecond] = sums.get(row.cluster) ?? [0, 0];
    const pull = row.weight * residual;
    sums.set(row.cluster, [ofFirst + pull * byFirst, ofSecond + pull * bySecond]);
  }
  const patients = sums.size;
  if (patients < 2) throw new TooFewValuesError(`${NAME}: patients`, patients, 2);
  let [firstVariance, secondVariance] = [0, 0];
  for (const [ofFirst, ofSecond] of sums.values()) {
    firstVariance += ((m.secondSecond * ofFirst - m.firstSecond * ofSecond) / m.determinant) ** 2;
    secondVariance += ((m.firstFirst * ofSecond - m.firstSecond * ofFirst) / m.determinant) ** 2;
  }
  const factor = ((patients / (patients - 1)) * (rows.length - 1)) / (rows.length - 3);
  return {
    firstStandardError: Math.sqrt(factor * firstVariance),
    secondStandardError: Math.sqrt(factor * secondVariance),
  };
}
