/**
 * Error summary — the figures that the published protocols ask for, from one list of prediction errors.
 *
 * Inputs: errorsD, D, achieved minus predicted; clusters, the patient of each eye; each eye a patient of its own when
 *   absent.
 * Result: mean with interval, SD, range, mean and median absolute error in D; share within 0.25, 0.50, 0.75, 1.00 and
 *   2.00 D, ends included, each with its Wilson interval.
 * Outside the valid range: throws TooFewValuesError below two patients, OutOfRangeError for one that is no number.
 * Source: Wang, Koch, Hill, Abulafia, J Cataract Refract Surg 2017;43:999 [V first page]; Hoffer et al., Am J Ophthalmol
 *   2015;160:1086 [V first part]; Holladay, Wilcox, Koch, Wang, J Cataract Refract Surg 2021;47:65-77 (SD is the best single
 *   measure) [M].
 * Erratum / variant: an error counts as within a band up to 1e-9 D beyond it, so that 0.1 - (-0.4) is within 0.50.
 */
import { meanAbsoluteError, medianAbsoluteError } from './absolute-error';
import { clusteredMean, designEffect } from './clustered-mean';
import { sampleSd } from './mean-and-deviation';
import { wilsonInterval } from './wilson-interval';
import type { Cluster } from './clustered-mean';
import type { Interval } from './wilson-interval';

export interface BandShare {
  bandD: number;
  count: number;
  share: number;
  interval: Interval;
}

export interface ErrorSummary {
  count: number;
  patientCount: number;
  meanD: number;
  meanStandardErrorD: number;
  meanIntervalD: Interval;
  sdD: number;
  minD: number;
  maxD: number;
  meanAbsoluteD: number;
  medianAbsoluteD: number;
  bands: BandShare[];
}

export const errorBandsD = [0.25, 0.5, 0.75, 1, 2] as const;

const ROUNDING_D = 1e-9;

/** Counts "<=", as the protocols do. */
export function isWithinBand(errorD: number, bandD: number): boolean {
  return Math.abs(errorD) <= bandD + ROUNDING_D;
}

export function summariseErrors(errorsD: readonly number[], clusters?: readonly Cluster[]): ErrorSummary {
  const patients = clusters ?? errorsD.map((_, index) => index);
  const centre = clusteredMean(errorsD, patients);
  return {
    count: errorsD.length,
    patientCount: centre.clusterCount,
    meanD: centre.mean,
    meanStandardErrorD: centre.standardError,
    meanIntervalD: centre.interval,
    sdD: sampleSd(errorsD),
    minD: errorsD.reduce((least, errorD) => Math.min(least, errorD), Infinity) + 0,
    maxD: errorsD.reduce((most, errorD) => Math.max(most, errorD), -Infinity) + 0,
    meanAbsoluteD: meanAbsoluteError(errorsD),
    medianAbsoluteD: medianAbsoluteError(errorsD),
    bands: errorBandsD.map((bandD) => shareWithin(errorsD, bandD, patients)),
  };
}

/** Share of eyes within a band, with an interval that knows which eyes belong to one patient. */
export function shareWithin(
  errorsD: readonly number[],
  bandD: number,
  clusters: readonly Cluster[],
): BandShare {
  const hits = errorsD.map((errorD) => (isWithinBand(errorD, bandD) ? 1 : 0));
  const count = hits.reduce((sum: number, hit) => sum + hit, 0);
  const total = errorsD.length;
  const interval = wilsonInterval({ count, total, designEffect: designEffect(hits, clusters) });
  return { bandD, count, share: count / total, interval };
}
