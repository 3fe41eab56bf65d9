/**
 * Describing one list. Beside R (reference/statistics.R) stand simple-statistics, mathjs and the certified values of
 * NIST's Statistical Reference Datasets.
 */
import * as fc from 'fast-check';
import { std } from 'mathjs';
import * as simple from 'simple-statistics';
import { OutOfRangeError } from '@/formulas';
import { meanAbsoluteError, medianAbsoluteError } from '@/formulas/statistics/absolute-error';
import { errorBandsD, isWithinBand, shareWithin, summariseErrors } from '@/formulas/statistics/error-summary';
import { TooFewValuesError } from '@/formulas/statistics/errors';
import { mean, sampleSd, sampleVariance } from '@/formulas/statistics/mean-and-deviation';
import { median, quantile } from '@/formulas/statistics/quantile';
import { trimmedMean, winsorisedCovariance, winsorisedVariance } from '@/formulas/statistics/trimmed';
import { wilsonInterval } from '@/formulas/statistics/wilson-interval';
import reference from '../reference/statistics.json';

const { first, second, describe: expected, trimmed } = reference;
const number = fc.double({ min: -5, max: 5, noNaN: true });
const numbers = fc.array(number, { minLength: 5, maxLength: 60 });

describe('mean and standard deviation', () => {
  it('give the certified values of NIST StRD Michelso', () => {
    const speeds = reference.michelson.map((speed) => 299 + speed / 1000);

    expect(mean(speeds)).toBeCloseTo(299.8524, 12);
    expect(sampleSd(speeds)).toBeCloseTo(0.0790105478190518, 12);
  });

  // Structure and certified values from memory: 1001 numbers, SD exactly 0.1 on a large mean.
  it('give the certified values of NIST StRD NumAcc4', () => {
    const values = [10000000.2, ...Array.from({ length: 1000 }, (_, at) => 10000000.1 + (at % 2) * 0.2)];

    expect(mean(values)).toBeCloseTo(10000000.2, 8);
    expect(Math.abs(sampleSd(values) - 0.1)).toBeLessThan(1e-8);
  });

  it('agree with R, simple-statistics and mathjs', () => {
    expect(mean(first)).toBeCloseTo(expected.mean, 15);
    expect(sampleVariance(first)).toBeCloseTo(expected.variance, 15);
    expect(sampleSd(first)).toBeCloseTo(expected.sd, 15);
    expect(mean(second)).toBeCloseTo(simple.mean(second), 14);
    expect(sampleSd(second)).toBeCloseTo(simple.sampleStandardDeviation(second), 14);
    expect(sampleSd(second)).toBeCloseTo(std(second) as unknown as number, 14);
  });

  it('move and stretch with the values, whatever their order', () => {
    fc.assert(
      fc.property(numbers, number, number, (values, shift, factor) => {
        const changed = [...values].reverse().map((value) => factor * value + shift);

        expect(mean(changed)).toBeCloseTo(factor * mean(values) + shift, 10);
        expect(sampleSd(changed)).toBeCloseTo(Math.abs(factor) * sampleSd(values), 10);
      }),
    );
  });

  it('need one value for a mean and two for a deviation', () => {
    expect(mean([0.3])).toBe(0.3);
    expect(() => mean([])).toThrow(new TooFewValuesError('mean', 0, 1));
    expect(() => sampleSd([0.3])).toThrow(new TooFewValuesError('variance', 1, 2));
    expect(sampleSd([0.1, 0.1, 0.1])).toBe(0);
  });

  it('refuse what is no number, and never give minus zero', () => {
    expect(() => mean([1, NaN])).toThrow(OutOfRangeError);
    expect(() => sampleSd([1, Infinity])).toThrow(OutOfRangeError);
    expect(Object.is(mean([-0, -0]), 0)).toBe(true);
    expect(Object.is(median([-0]), 0)).toBe(true);
  });
});

describe('quantiles', () => {
  const shares = [0, 0.025, 0.1, 0.25, 0.5, 0.75, 0.9, 0.975, 1];

  it('agree with R, type 7', () => {
    shares.forEach((share, index) => {
      expect(quantile(first, share)).toBeCloseTo(expected.quantiles[index]!, 14);
    });
    expect(median(first)).toBeCloseTo(expected.median, 15);
    expect(median(second)).toBeCloseTo(simple.median(second), 15);
  });

  it('are of type 7: a quarter of 1, 2, 3, 4 is 1.75', () => {
    expect(quantile([4, 1, 3, 2], 0.25)).toBe(1.75);
    expect(quantile([4, 1, 3, 2], 1)).toBe(4);
    expect(median([5])).toBe(5);
  });

  it('move and stretch with the values and rise with the share', () => {
    fc.assert(
      fc.property(numbers, number, fc.double({ min: 0, max: 1, noNaN: true }), (values, shift, share) => {
        const changed = [...values].reverse().map((value) => 2 * value + shift);

        expect(quantile(changed, share)).toBeCloseTo(2 * quantile(values, share) + shift, 10);
        expect(quantile(values, share)).toBeGreaterThanOrEqual(quantile(values, share / 2));
      }),
    );
  });

  it('refuse an empty list and a share beyond 0 to 1', () => {
    expect(() => median([])).toThrow(TooFewValuesError);
    expect(() => quantile([1, 2], 1.01)).toThrow(OutOfRangeError);
  });
});

describe('absolute errors', () => {
  it('agree with R', () => {
    expect(meanAbsoluteError(first)).toBeCloseTo(expected.meanAbsolute, 15);
    expect(medianAbsoluteError(first)).toBeCloseTo(expected.medianAbsolute, 15);
  });

  it('are not the absolute value of the mean and the median', () => {
    expect(meanAbsoluteError([-1, 1, 3])).toBeCloseTo(5 / 3, 15);
    expect(medianAbsoluteError([-3, -2, 1])).toBe(2);
  });

  it('need a value', () => {
    expect(() => meanAbsoluteError([])).toThrow(TooFewValuesError);
    expect(() => medianAbsoluteError([])).toThrow(TooFewValuesError);
  });
});

describe('trimmed mean and Winsorised variance', () => {
  it('agree with R', () => {
    expect(trimmedMean(first)).toBeCloseTo(trimmed.mean20, 15);
    expect(trimmedMean(first, 0.1)).toBeCloseTo(trimmed.mean10, 15);
    expect(winsorisedVariance(first)).toBeCloseTo(trimmed.variance20, 15);
    expect(winsorisedCovariance(first, second)).toBeCloseTo(trimmed.covariance20, 15);
  });

  it('cut floor(trim n) from each end', () => {
    // 0.2 of 9 is 1.8: one from each end.
    expect(trimmedMean([1, 2, 3, 4, 5, 6, 7, 8, 100])).toBe(5);
    // Drawn in to 2 and 8: 2 2 3 4 5 6 7 8 8.
    expect(winsorisedVariance([1, 2, 3, 4, 5, 6, 7, 8, 100])).toBeCloseTo(5.75, 14);
  });

  it('are the plain ones without a trim', () => {
    expect(trimmedMean(first, 0)).toBeCloseTo(mean(first), 15);
    expect(winsorisedVariance(first, 0)).toBeCloseTo(sampleVariance(first), 15);
  });

  it('move and stretch with the values, whatever their order', () => {
    fc.assert(
      fc.property(numbers, number, number, (values, shift, factor) => {
        const changed = [...values].reverse().map((value) => factor * value + shift);

        expect(trimmedMean(changed)).toBeCloseTo(factor * trimmedMean(values) + shift, 10);
        expect(winsorisedVariance(changed)).toBeCloseTo(factor * factor * winsorisedVariance(values), 8);
      }),
    );
  });

  it('refuse a trim of a half and lists of different lengths', () => {
    expect(() => trimmedMean([1, 2, 3], 0.5)).toThrow(OutOfRangeError);
    expect(() => trimmedMean([1, 2, 3], -0.1)).toThrow(OutOfRangeError);
    expect(() => winsorisedCovariance([1, 2], [1])).toThrow(/one length/);
  });
});

describe('the Wilson interval', () => {
  it.each(reference.wilson)('of $count of $total at $confidence agrees with R', (row) => {
    const interval = wilsonInterval(row);

    expect(interval.low).toBeCloseTo(row.low, 12);
    expect(interval.high).toBeCloseTo(row.high, 12);
  });

  it('gives the published interval of 6 in 32', () => {
    expect(wilsonInterval({ count: 6, total: 32 })).toEqual({
      low: expect.closeTo(0.08889545, 8),
      high: expect.closeTo(0.35309155, 8),
    });
  });

  // Newcombe 1998 compares methods on 81 of 263, from memory: 0.2553 to 0.3662.
  it('gives 0.2553 to 0.3662 for 81 of 263', () => {
    const { low, high } = wilsonInterval({ count: 81, total: 263 });

    expect([low, high].map((end) => end.toFixed(4))).toEqual(['0.2553', '0.3662']);
  });

  it('holds the share, stays within 0 to 1 and mirrors', () => {
    fc.assert(
      fc.property(fc.nat(400), fc.nat(400), fc.double({ min: 1, max: 2, noNaN: true }), (a, b, effect) => {
        const total = a + b + 2;
        const { low, high } = wilsonInterval({ count: a, total, designEffect: effect });
        const mirrored = wilsonInterval({ count: total - a, total, designEffect: effect });

        expect(low).toBeGreaterThanOrEqual(0);
        expect(low).toBeLessThanOrEqual(a / total);
        expect(high).toBeGreaterThanOrEqual(a / total);
        expect(high).toBeLessThanOrEqual(1);
        expect(mirrored.low).toBeCloseTo(1 - high, 12);
      }),
    );
  });

  it('is as wide with a design effect of 2 as with half of the eyes', () => {
    const half = wilsonInterval({ count: 30, total: 50 });
    const doubled = wilsonInterval({ count: 60, total: 100, designEffect: 2 });

    expect(doubled.low).toBeCloseTo(half.low, 14);
    expect(doubled.high).toBeCloseTo(half.high, 14);
  });

  it.each([
    [{ count: 5, total: 4 }],
    [{ count: -1, total: 4 }],
    [{ count: 1.5, total: 4 }],
    [{ count: 0, total: 0 }],
    [{ count: 1, total: 4, confidence: 1 }],
    [{ count: 1, total: 4, designEffect: 0.5 }],
  ])('refuses %j', (question) => expect(() => wilsonInterval(question)).toThrow(OutOfRangeError));
});

describe('the summary of errors', () => {
  it('counts an error at the edge of a band as within', () => {
    // 0.1 - (-0.4) is 0.5 in print; -0.3 - 0.7 is a hair beyond -1 or on it.
    expect(isWithinBand(0.1 - -0.4, 0.5)).toBe(true);
    expect(isWithinBand(-0.3 - 0.7, 1)).toBe(true);
    expect(isWithinBand(0.7 - 0.6 + 0.15, 0.25)).toBe(true);
    expect(isWithinBand(0.500001, 0.5)).toBe(false);
  });

  it('gives n with each share', () => {
    const { count, bands, minD, maxD } = summariseErrors([-0.25, 0.25, 0.5, -0.75, 1, 2, 2.01, 0.1]);

    expect(count).toBe(8);
    expect([minD, maxD]).toEqual([-0.75, 2.01]);
    expect(bands.map(({ bandD, count: within }) => [bandD, within])).toEqual([
      [0.25, 3],
      [0.5, 4],
      [0.75, 5],
      [1, 6],
      [2, 7],
    ]);
    expect(bands[1]).toMatchObject({ share: 0.5, interval: wilsonInterval({ count: 4, total: 8 }) });
  });

  it('agrees with its parts', () => {
    const summary = summariseErrors(first, reference.patient);

    expect(summary.meanD).toBe(mean(first));
    expect(summary.sdD).toBe(sampleSd(first));
    expect(summary.meanAbsoluteD).toBe(meanAbsoluteError(first));
    expect(summary.medianAbsoluteD).toBe(medianAbsoluteError(first));
    expect(summary.patientCount).toBe(30);
    expect(summary.meanStandardErrorD).toBeCloseTo(reference.clustered.standardError, 14);
    expect(summary.bands).toHaveLength(errorBandsD.length);
  });

  it('widens the interval of a share when both eyes of patients land alike', () => {
    const pair = [0.1, 0.1, 0.9, 0.9, 0.2, 0.2, 0.8, 0.8, 0.1, 0.1];
    const asPatients = shareWithin(pair, 0.5, [1, 1, 2, 2, 3, 3, 4, 4, 5, 5]);
    const asEyes = shareWithin(pair, 0.5, [1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);

    expect(asPatients.share).toBe(asEyes.share);
    expect(asPatients.interval.high - asPatients.interval.low).toBeGreaterThan(
      1.2 * (asEyes.interval.high - asEyes.interval.low),
    );
  });

  it('needs two patients', () => {
    expect(() => summariseErrors([0.3])).toThrow(TooFewValuesError);
    expect(() => summariseErrors([0.3, 0.2], ['a', 'a'])).toThrow(/patients/);
  });
});
