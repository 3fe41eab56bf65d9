/** Intervals that know about patients, bootstrap, folds and ellipses: beside R, enumeration and simulation. */
import * as fc from 'fast-check';
import { OutOfRangeError } from '@/formulas';
import { randomFromSeed } from '@/formulas/solvers/random';
import { bootstrapPercentile, bootstrapTrimmedMean } from '@/formulas/statistics/bootstrap';
import { clusteredMean, designEffect } from '@/formulas/statistics/clustered-mean';
import { centroidOf, doubleAngleEllipse } from '@/formulas/statistics/double-angle-ellipse';
import { DegenerateDataError, TooFewValuesError, UnequalLengthsError } from '@/formulas/statistics/errors';
import { foldOfEach, oneEyePerPatient, outOfSampleErrors } from '@/formulas/statistics/k-fold';
import { mean, sampleSd } from '@/formulas/statistics/mean-and-deviation';
import { median } from '@/formulas/statistics/quantile';
import { twoSidedStudent } from '@/formulas/statistics/student-t';
import { trimmedMean } from '@/formulas/statistics/trimmed';
import type { Ellipse } from '@/formulas/statistics/double-angle-ellipse';
import reference from '../reference/statistics.json';

const { first, patient, x, y } = reference;

describe('the clustered mean', () => {
  it('agrees with the cluster sandwich of R', () => {
    const result = clusteredMean(first, patient);

    expect(result.standardError).toBeCloseTo(reference.clustered.standardError, 14);
    expect(result.interval.low).toBeCloseTo(reference.clustered.low, 11);
    expect(result.interval.high).toBeCloseTo(reference.clustered.high, 11);
    expect(result).toMatchObject({ clusterCount: 30, degreesOfFreedom: 29, mean: mean(first) });
    expect(designEffect(first, patient)).toBeCloseTo(reference.clustered.designEffect, 12);
  });

  it("is SD/sqrt(n) and Student's interval with one eye per patient", () => {
    const numbers = fc.array(fc.double({ min: -3, max: 3, noNaN: true }), { minLength: 3, maxLength: 30 });
    fc.assert(
      fc.property(numbers, (values) => {
        const { standardError, interval } = clusteredMean(
          values,
          values.map((_, index) => `patient ${index}`),
        );
        const plain = sampleSd(values) / Math.sqrt(values.length);

        expect(standardError).toBeCloseTo(plain, 12);
        expect(interval.high - interval.low).toBeCloseTo(
          2 * twoSidedStudent(0.95, values.length - 1) * plain,
          10,
        );
      }),
    );
  });

  it('counts eyes that land alike as one', () => {
    const values = [0.1, 0.4, -0.2, 0.6, 0.3];
    const eyes = [...values, ...values];
    const patients = [0, 1, 2, 3, 4, 0, 1, 2, 3, 4];

    expect(clusteredMean(eyes, patients).standardError).toBeCloseTo(sampleSd(values) / Math.sqrt(5), 14);
    expect(designEffect(eyes, patients)).toBeCloseTo((2 * 9) / 8, 12);
  });

  it('holds the true mean in 95 % of cohorts with both eyes, where the plain interval does not', () => {
    const random = randomFromSeed(31);
    const cohorts = 2000;
    const patients = Array.from({ length: 80 }, (_, eye) => Math.floor(eye / 2));
    let [clustered, plain] = [0, 0];
    for (let cohort = 0; cohort < cohorts; cohort += 1) {
      const shared = Array.from({ length: 40 }, () => 0.35 * random.normal());
      const values = patients.map((one) => 0.2 + shared[one]! + 0.2 * random.normal());
      const holds = ({ low, high }: { low: number; high: number }) => low <= 0.2 && high >= 0.2;
      if (holds(clusteredMean(values, patients).interval)) clustered += 1;
      if (holds(clusteredMean(values, [...values.keys()]).interval)) plain += 1;
    }

    expect(clustered / cohorts).toBeGreaterThan(0.935);
    expect(clustered / cohorts).toBeLessThan(0.965);
    expect(plain / cohorts).toBeLessThan(0.89);
  });

  it('assumes the most where all values are equal', () => {
    expect(designEffect([1, 1, 1, 1], ['a', 'a', 'b', 'c'])).toBe(1.5);
    expect(designEffect([1, 1, 1], [1, 2, 3])).toBe(1);
  });

  it('refuses fewer than two patients and lists that do not match', () => {
    expect(() => clusteredMean([1, 2], ['a', 'a'])).toThrow(TooFewValuesError);
    expect(() => clusteredMean([1], ['a'])).toThrow(TooFewValuesError);
    expect(() => clusteredMean([1, 2], ['a'])).toThrow(UnequalLengthsError);
    expect(() => clusteredMean([1, 2], ['a', 'b'], 1)).toThrow(OutOfRangeError);
  });
});

describe('bootstrap intervals', () => {
  it('are the same for the same seed and move little for another', () => {
    const one = bootstrapPercentile(first, median, { seed: 1 });
    const other = bootstrapPercentile(first, median, { seed: 2 });

    expect(bootstrapPercentile(first, median, { seed: 1 })).toEqual(one);
    expect(other).not.toEqual(one);
    expect(Math.abs(other.low - one.low)).toBeLessThan(0.05);
  });

  it('resample as enumeration says: the sum of three draws from 0, 0, 1', () => {
    // 27 equally likely samples: 8 have the sum 0, 12 the sum 1, 6 the sum 2, 1 the sum 3.
    const sums: number[] = [];
    bootstrapPercentile(
      [0, 0, 1],
      (sample) => {
        const sum = sample.reduce((total, value) => total + value, 0);
        sums.push(sum);
        return sum;
      },
      { seed: 4, resamples: 20_000 },
    );
    const shareOf = (sum: number) => sums.filter((each) => each === sum).length / 20_000;

    expect(Math.abs(shareOf(0) - 8 / 27)).toBeLessThan(0.01);
    expect(Math.abs(shareOf(1) - 12 / 27)).toBeLessThan(0.01);
    expect(Math.abs(shareOf(3) - 1 / 27)).toBeLessThan(0.005);
  });

  it('of a mean are near the normal interval', () => {
    const random = randomFromSeed(8);
    const values = Array.from({ length: 400 }, () => random.normal());
    const half = (1.96 * sampleSd(values)) / 20;
    const { low, high } = bootstrapPercentile(values, mean, { seed: 9, resamples: 4000 });

    expect(Math.abs(low - (mean(values) - half))).toBeLessThan(0.012);
    expect(Math.abs(high - (mean(values) + half))).toBeLessThan(0.012);
  });

  it('can resample whole patients', () => {
    const patients = [[0.1, 0.2], [0.4], [-0.3, -0.2], [0.6], [0.2, 0.1]];
    const meanOfEyes = (sample: readonly number[][]) => mean(sample.flat());
    const { low, high } = bootstrapPercentile(patients, meanOfEyes, { seed: 3 });

    expect(low).toBeLessThan(mean(patients.flat()));
    expect(high).toBeGreaterThan(mean(patients.flat()));
  });

  it('of a trimmed mean are symmetric about it and hold it as often as they say', () => {
    const random = randomFromSeed(12);
    const cohorts = 250;
    let held = 0;
    for (let cohort = 0; cohort < cohorts; cohort += 1) {
      // Heavy tails: one eye in ten scatters four times as much.
      const values = Array.from(
        { length: 25 },
        () => (random.uniform() < 0.1 ? 1.2 : 0.3) * random.normal() + 0.1,
      );
      const { low, high } = bootstrapTrimmedMean(values, { seed: cohort, resamples: 399 });
      expect((low + high) / 2).toBeCloseTo(trimmedMean(values), 12);
      if (low <= 0.1 && high >= 0.1) held += 1;
    }

    expect(held / cohorts).toBeGreaterThan(0.92);
    expect(held / cohorts).toBeLessThan(0.985);
  });

  it('refuse too little to resample', () => {
    expect(() => bootstrapPercentile([1], mean, { seed: 1 })).toThrow(TooFewValuesError);
    expect(() => bootstrapPercentile([1, 2], mean, { seed: 1, resamples: 10 })).toThrow(OutOfRangeError);
    expect(() => bootstrapPercentile([1, 2], mean, { seed: 1, confidence: 2 })).toThrow(OutOfRangeError);
    expect(() => bootstrapTrimmedMean([1, 2, 3, 4], { seed: 1 })).toThrow(TooFewValuesError);
    expect(() => bootstrapTrimmedMean([1, 1, 1, 1, 1], { seed: 1 })).toThrow(DegenerateDataError);
    // Trimmed, most resamples of one odd value among equal ones do not scatter.
    expect(() => bootstrapTrimmedMean([0, 0, 0, 0, 0, 1, 1, 1], { seed: 1, trim: 0.25 })).toThrow(
      DegenerateDataError,
    );
  });
});

describe('folds', () => {
  const division = { clusters: patient, foldCount: 5, seed: 1 };

  it('never part the two eyes of a patient and are of one size in patients', () => {
    const foldOf = foldOfEach(division);
    const foldsOfPatient = new Map<number, Set<number>>();
    patient.forEach((one, eye) => {
      foldsOfPatient.set(one, (foldsOfPatient.get(one) ?? new Set()).add(foldOf[eye]!));
    });
    const sizes = [0, 1, 2, 3, 4].map(
      (fold) => [...foldsOfPatient.values()].filter((folds) => folds.has(fold)).length,
    );

    expect([...foldsOfPatient.values()].every((folds) => folds.size === 1)).toBe(true);
    expect(sizes).toEqual([6, 6, 6, 6, 6]);
  });

  it('divide alike for the same seed only', () => {
    expect(foldOfEach(division)).toEqual(foldOfEach(division));
    expect(foldOfEach({ ...division, seed: 2 })).not.toEqual(foldOfEach(division));
  });

  it('judge every eye by a fit that has not seen it', () => {
    const values = [1, 2, 3, 4, 5, 6];
    const errors = outOfSampleErrors({
      foldOf: [0, 0, 1, 1, 2, 2],
      fit: (eyes) => mean(eyes.map((eye) => values[eye]!)),
      errorOf: (centre, eye) => values[eye]! - centre,
    });

    // Means of the other four: 4.5, 3.5 and 2.5.
    expect(errors).toEqual([-3.5, -2.5, -0.5, 0.5, 2.5, 3.5]);
  });

  it('leave one out gives the known relation n/(n - 1) of a mean', () => {
    const errors = outOfSampleErrors({
      foldOf: foldOfEach({ clusters: first.map((_, eye) => eye), foldCount: first.length, seed: 3 }),
      fit: (eyes) => mean(eyes.map((eye) => first[eye]!)),
      errorOf: (centre, eye) => first[eye]! - centre,
    });

    errors.forEach((error, eye) => {
      expect(error).toBeCloseTo(((first[eye]! - mean(first)) * 48) / 47, 12);
    });
  });

  it('choose one eye of each patient', () => {
    const eyes = oneEyePerPatient(patient, 5);

    expect(eyes.map((eye) => patient[eye])).toEqual(Array.from({ length: 30 }, (_, at) => at + 1));
    expect(eyes).toEqual([...eyes].sort((a, b) => a - b));
    expect(oneEyePerPatient(patient, 5)).toEqual(eyes);
    expect(oneEyePerPatient(patient, 6)).not.toEqual(eyes);
  });

  it('refuse fewer patients than folds and a single fold', () => {
    expect(() => foldOfEach({ clusters: [1, 1, 2], foldCount: 3, seed: 1 })).toThrow(TooFewValuesError);
    expect(() => foldOfEach({ clusters: [1, 2], foldCount: 1, seed: 1 })).toThrow(OutOfRangeError);
  });
});

describe('the double-angle ellipse', () => {
  const vectors = x.map((xD, index) => ({ xD, yD: y[index]! }));

  it.each(['eyes', 'centroid'] as const)('of the %s agrees with R by eigenvectors', (of) => {
    const ellipse = doubleAngleEllipse(vectors, of);
    const expected = reference.ellipse[of];

    expect(ellipse.longHalfAxisD).toBeCloseTo(expected.long, 10);
    expect(ellipse.shortHalfAxisD).toBeCloseTo(expected.short, 10);
    expect(ellipse.directionDeg).toBeCloseTo(expected.direction, 9);
    expect(ellipse.centre).toEqual({ xD: mean(x), yD: mean(y) });
  });

  it('has the centroid as a vector and as magnitude at an axis', () => {
    const against = { xD: -0.6, yD: 0 };
    const withRule = { xD: -0.2, yD: 0.6 };

    expect(centroidOf([against, withRule])).toEqual({
      xD: -0.4,
      yD: 0.3,
      cylinderD: 0.5,
      steepAxisDeg: expect.closeTo(71.565, 3),
    });
    expect(centroidOf([{ xD: 0.5, yD: 0 }, { xD: -0.5, yD: 0 }])).toMatchObject({ cylinderD: 0 }); // prettier-ignore
  });

  it('turns with the vectors', () => {
    const turned = vectors.map(({ xD, yD }) => ({ xD: -yD, yD: xD }));
    const before = doubleAngleEllipse(vectors, 'eyes');
    const after = doubleAngleEllipse(turned, 'eyes');

    expect(after.longHalfAxisD).toBeCloseTo(before.longHalfAxisD, 12);
    expect(after.directionDeg).toBeCloseTo((before.directionDeg + 90) % 180, 9);
  });

  it('holds the true centroid, and the next eye, in 95 % of small cohorts', () => {
    const random = randomFromSeed(41);
    const cohorts = 1500;
    const draw = () => {
      const common = random.normal();
      return { xD: 0.3 + 0.4 * common, yD: -0.1 + 0.2 * common + 0.3 * random.normal() };
    };
    let [centroid, next] = [0, 0];
    for (let cohort = 0; cohort < cohorts; cohort += 1) {
      const eyes = Array.from({ length: 8 }, draw);
      if (isInside(doubleAngleEllipse(eyes, 'centroid'), { xD: 0.3, yD: -0.1 })) centroid += 1;
      if (isInside(doubleAngleEllipse(eyes, 'eyes'), draw())) next += 1;
    }

    expect(Math.abs(centroid / cohorts - 0.95)).toBeLessThan(0.017);
    expect(Math.abs(next / cohorts - 0.95)).toBeLessThan(0.017);
  });

  it('flattens for vectors on a line and keeps its direction within 0 to 180', () => {
    const line = [1, 2, 3, 4].map((step) => ({ xD: step, yD: -step }));
    const ellipse = doubleAngleEllipse(line, 'eyes');

    expect(ellipse.shortHalfAxisD).toBeCloseTo(0, 6);
    expect(ellipse.directionDeg).toBeCloseTo(135, 9);
  });

  it('needs three vectors', () => {
    expect(() => doubleAngleEllipse(vectors.slice(0, 2), 'eyes')).toThrow(TooFewValuesError);
    expect(() => centroidOf([])).toThrow(TooFewValuesError);
    expect(() => doubleAngleEllipse(vectors, 'eyes', 0)).toThrow(OutOfRangeError);
  });
});

function isInside(ellipse: Ellipse, point: { xD: number; yD: number }): boolean {
  const angle = (ellipse.directionDeg * Math.PI) / 180;
  const [dx, dy] = [point.xD - ellipse.centre.xD, point.yD - ellipse.centre.yD];
  const along = (dx * Math.cos(angle) + dy * Math.sin(angle)) / ellipse.longHalfAxisD;
  const across = (dy * Math.cos(angle) - dx * Math.sin(angle)) / ellipse.shortHalfAxisD;
  return along * along + across * across <= 1;
}
