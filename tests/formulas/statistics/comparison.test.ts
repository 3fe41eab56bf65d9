/**
 * Comparing formulas in the same eyes. Beside R (reference/statistics.R; HC4 by its package sandwich) stand
 * simple-statistics, enumeration and simulation.
 */
import * as fc from 'fast-check';
import { binomialDistribution, tTest } from 'simple-statistics';
import { OutOfRangeError } from '@/formulas';
import { randomFromSeed } from '@/formulas/solvers/random';
import { cochranQ } from '@/formulas/statistics/cochran-q';
import { comparePairedDeviations } from '@/formulas/statistics/compare-deviations';
import { comparePairwise } from '@/formulas/statistics/compare-formulas';
import { DegenerateDataError, TooFewValuesError, UnequalLengthsError } from '@/formulas/statistics/errors';
import { holmAdjusted } from '@/formulas/statistics/holm';
import { mcNemarTest, mcNemarWithin } from '@/formulas/statistics/mcnemar';
import { sampleSd } from '@/formulas/statistics/mean-and-deviation';
import { yuenPairedTest } from '@/formulas/statistics/yuen-paired';
import reference from '../reference/statistics.json';

const { first, second, third } = reference;
const absolute = (values: number[]) => values.map(Math.abs);
/** To the hundredth of a dioptre, as errors come. */
const number = fc.integer({ min: -300, max: 300 }).map((hundredths) => hundredths / 100);
const pairs = fc.array(fc.tuple(number, number), { minLength: 10, maxLength: 40 });
const unzip = (list: [number, number][]) => [list.map(([a]) => a), list.map(([, b]) => b)] as const;

describe("Yuen's paired test", () => {
  it.each([
    ['absolute errors, 20 %', absolute(first), absolute(second), 0.2, reference.yuen.plain],
    ['errors, 10 %', first, third, 0.1, reference.yuen.ten],
    ['errors, untrimmed', first, third, 0, reference.yuen.none],
  ])('agrees with R: %s', (_, a, b, trim, expected) => {
    const { interval, ...result } = yuenPairedTest(a, b, { trim });
    const { low, high, ...figures } = expected;

    for (const key of Object.keys(figures) as (keyof typeof figures)[]) {
      expect(result[key]).toBeCloseTo(figures[key], 12);
    }
    expect(interval.low).toBeCloseTo(low, 11);
    expect(interval.high).toBeCloseTo(high, 11);
  });

  it("is Student's paired test without a trim, in R and in simple-statistics", () => {
    const { statistic, pValue } = yuenPairedTest(first, third, { trim: 0 });
    const differences = first.map((value, index) => value - third[index]!);

    expect(pValue).toBeCloseTo(reference.pairedT, 13);
    // simple-statistics divides by the population's standard deviation, with n in place of n - 1.
    expect(statistic).toBeCloseTo(tTest(differences, 0) * Math.sqrt(47 / 48), 12);
  });

  it('turns round with the lists and does not mind a shift of both', () => {
    const there = yuenPairedTest(first, second);
    const back = yuenPairedTest(second, first);
    const shifted = yuenPairedTest(
      first.map((value) => value + 3),
      second.map((value) => value + 3),
    );

    expect(back.difference).toBeCloseTo(-there.difference, 14);
    expect(back.pValue).toBeCloseTo(there.pValue, 14);
    expect(back.interval.low).toBeCloseTo(-there.interval.high, 14);
    expect(shifted.pValue).toBeCloseTo(there.pValue, 10);
  });

  it('refuses too few eyes, lists that do not match and errors that move together', () => {
    expect(() => yuenPairedTest([1], [2])).toThrow(TooFewValuesError);
    expect(() => yuenPairedTest([1, 2, 3], [1, 2])).toThrow(UnequalLengthsError);
    expect(() => yuenPairedTest([1, 2, 3, 4], [2, 3, 4, 5])).toThrow(DegenerateDataError);
    expect(() => yuenPairedTest([1, 2, 3], [1, 2, NaN])).toThrow(OutOfRangeError);
    expect(() => yuenPairedTest([1, 2, 4, 9], [1, 2, 3, 4], { trim: 0.4 })).not.toThrow();
    expect(() => yuenPairedTest([1, 2, 4], [1, 2, 3], { trim: 0.4 })).toThrow(/after trimming/);
  });
});

describe('the paired comparison of standard deviations', () => {
  it.each([
    ['first and second', first, second, reference.deviations.firstSecond],
    ['first and third', first, third, reference.deviations.firstThird],
  ])('agrees with R: %s', (_, a, b, expected) => {
    const result = comparePairedDeviations(a, b);

    for (const key of Object.keys(expected) as (keyof typeof expected)[]) {
      expect(result[key]).toBeCloseTo(expected[key], 12);
    }
  });

  it('changes sign with the lists; neither shift nor scale matters', () => {
    fc.assert(
      fc.property(pairs, number, (list, shift) => {
        const [a, b] = unzip(list);
        fc.pre(new Set(a).size > 5 && new Set(b).size > 5);
        fc.pre(Math.abs(sampleSd(a) - sampleSd(b)) > 1e-9);
        const there = comparePairedDeviations(a, b);
        const back = comparePairedDeviations(b, a);
        const changed = comparePairedDeviations(
          a.map((value) => 2 * value + shift),
          b.map((value) => 2 * value - shift),
        );

        expect(there.correlation > 0).toBe(sampleSd(a) > sampleSd(b));
        expect(back.pValue).toBeCloseTo(there.pValue, 8);
        expect(back.correlation).toBeCloseTo(-there.correlation, 8);
        expect(changed.pValue).toBeCloseTo(there.pValue, 6);
      }),
    );
  });

  it('keeps its level where the errors have heavy tails, as the plain test does not', () => {
    const random = randomFromSeed(19);
    const cohorts = 1500;
    let [robust, plain] = [0, 0];
    for (let cohort = 0; cohort < cohorts; cohort += 1) {
      // One common divisor of both errors: independent in sign, dependent in size, equal SD.
      const eyes = Array.from({ length: 60 }, () => {
        const size =
          0.4 / Math.sqrt((random.normal() ** 2 + random.normal() ** 2 + random.normal() ** 2) / 3);
        return [size * random.normal(), size * random.normal()] as [number, number];
      });
      const { pValue, correlation } = comparePairedDeviations(...unzip(eyes));
      if (pValue <= 0.05) robust += 1;
      // Critical correlation of 60 pairs at 0.05: 0.2542.
      if (Math.abs(correlation) > 0.2542) plain += 1;
    }

    expect(robust / cohorts).toBeLessThan(0.07);
    expect(plain / cohorts).toBeGreaterThan(0.15);
  });

  it('sees a formula that scatters half again as much', () => {
    const random = randomFromSeed(23);
    const eyes = Array.from({ length: 200 }, () => {
      const common = 0.3 * random.normal();
      return [common + 0.1 * random.normal(), 1.5 * common + 0.1 * random.normal()] as [number, number];
    });
    const { pValue, correlation } = comparePairedDeviations(...unzip(eyes));

    expect(correlation).toBeLessThan(0);
    expect(pValue).toBeLessThan(1e-6);
  });

  it('refuses too few eyes and errors without the scatter it needs', () => {
    expect(() => comparePairedDeviations([1, 2, 3], [1, 3, 2])).toThrow(TooFewValuesError);
    expect(() => comparePairedDeviations([1, 2, 3, 4], [1, 2, 3])).toThrow(UnequalLengthsError);
    expect(() => comparePairedDeviations([0.1, 0.2, 0.3, 0.7], [0.2, 0.3, 0.4, 0.8])).toThrow(
      DegenerateDataError,
    );
    expect(() => comparePairedDeviations([1, 2, 3, 5], [2, 4, 6, 10])).toThrow(DegenerateDataError);
    expect(() => comparePairedDeviations([1, 2, 3, 5, 9], [1, 2, 3, 5, 4])).toThrow(/single eye/);
  });
});

describe("Holm's step-down", () => {
  it('agrees with R', () => {
    holmAdjusted(reference.holm.p).forEach((adjusted, index) => {
      expect(adjusted).toBeCloseTo(reference.holm.adjusted[index]!, 15);
    });
  });

  it('multiplies the smallest by the count and never falls', () => {
    expect(holmAdjusted([0.01, 0.04, 0.03])).toEqual([0.03, 0.06, 0.06]);
    expect(holmAdjusted([0.6, 0.7])).toEqual([1, 1]);
    expect(holmAdjusted([])).toEqual([]);
  });

  it('keeps the order of the p-values, is never below p nor above Bonferroni', () => {
    const pValue = fc.double({ min: 0, max: 1, noNaN: true });
    fc.assert(
      fc.property(fc.array(pValue, { minLength: 1, maxLength: 12 }), (pValues) => {
        const adjusted = holmAdjusted(pValues);
        const order = pValues.map((_, index) => index).sort((a, b) => pValues[a]! - pValues[b]!);

        order.forEach((index, rank) => {
          expect(adjusted[index]).toBeGreaterThanOrEqual(pValues[index]!);
          expect(adjusted[index]).toBeLessThanOrEqual(Math.min(1, pValues.length * pValues[index]! + 1e-15));
          if (rank > 0) expect(adjusted[index]).toBeGreaterThanOrEqual(adjusted[order[rank - 1]!]!);
        });
        expect(holmAdjusted([...pValues].reverse())).toEqual([...adjusted].reverse());
      }),
    );
  });

  it('refuses what is no probability', () => {
    expect(() => holmAdjusted([0.2, 1.2])).toThrow(OutOfRangeError);
    expect(() => holmAdjusted([NaN])).toThrow(OutOfRangeError);
  });

  it('goes over all pairs of formulas', () => {
    const lists = [
      { name: 'srkt', values: [1] },
      { name: 'haigis', values: [2] },
      { name: 't2', values: [4] },
    ] as const;
    const pairs = comparePairwise(lists, ([a = 0], [b = 0]) => (a + b) / 100);

    expect(pairs).toEqual([
      { first: 'srkt', second: 'haigis', pValue: 0.03, adjustedP: 0.09 },
      { first: 'srkt', second: 't2', pValue: 0.05, adjustedP: 0.1 },
      { first: 'haigis', second: 't2', pValue: 0.06, adjustedP: 0.1 },
    ]);
  });
});

describe("McNemar's test", () => {
  it.each(reference.mcnemar)('of $onlyFirst against $onlySecond agrees with R', (row) => {
    const result = mcNemarTest(row);

    expect(result.exactP).toBeCloseTo(row.exactP, 12);
    expect(result.correctedStatistic).toBeCloseTo(row.correctedStatistic, 12);
    expect(result.correctedP).toBeCloseTo(row.correctedP, 12);
  });

  it("stands beside the published 17.3559 of Agresti's ratings, uncorrected", () => {
    const { correctedStatistic } = mcNemarTest({ onlyFirst: 86, onlySecond: 150 });

    // (64 - 1)²/236 against 64²/236.
    expect((correctedStatistic * 64 ** 2) / 63 ** 2).toBeCloseTo(17.3559, 4);
  });

  it('is exact: twice the smaller binomial tail of simple-statistics', () => {
    const tail = (upTo: number, total: number) =>
      binomialDistribution(total, 0.5)!
        .slice(0, upTo + 1)
        .reduce((sum, chance) => sum + chance, 0);
    for (const [onlyFirst, onlySecond] of [
      [2, 9],
      [9, 2],
      [5, 6],
      [0, 1],
    ] as const) {
      const expected = 2 * tail(Math.min(onlyFirst, onlySecond), onlyFirst + onlySecond);

      expect(mcNemarTest({ onlyFirst, onlySecond }).exactP).toBeCloseTo(Math.min(1, expected), 8);
    }
  });

  it('says nothing where no eye differs or both differ equally', () => {
    expect(mcNemarTest({ onlyFirst: 0, onlySecond: 0 })).toEqual({
      onlyFirst: 0,
      onlySecond: 0,
      exactP: 1,
      correctedStatistic: 0,
      correctedP: 1,
    });
    expect(mcNemarTest({ onlyFirst: 7, onlySecond: 7 })).toMatchObject({ exactP: 1, correctedP: 1 });
  });

  it('counts the eyes that one formula alone brings within the band', () => {
    const result = mcNemarWithin([0.5, 0.6, -0.2, 0.9, 0.1], [0.6, 0.5, 0.2, -0.4, 1], 0.5);

    expect(result).toMatchObject({ onlyFirst: 2, onlySecond: 2 });
    expect(mcNemarWithin([0.1], [0.9], 0.5)).toMatchObject({ onlyFirst: 1, onlySecond: 0, exactP: 1 });
  });

  it('refuses what is no count and lists that do not match', () => {
    expect(() => mcNemarTest({ onlyFirst: -1, onlySecond: 2 })).toThrow(OutOfRangeError);
    expect(() => mcNemarTest({ onlyFirst: 1.5, onlySecond: 2 })).toThrow(OutOfRangeError);
    expect(() => mcNemarWithin([1], [1, 2], 0.5)).toThrow(UnequalLengthsError);
  });
});

describe("Cochran's Q", () => {
  const within = first.map((_, eye) => [first, second, third].map((list) => Math.abs(list[eye]!) <= 0.25));

  it("agrees with R's Friedman test of the same zeros and ones", () => {
    const { statistic, degreesOfFreedom, pValue } = cochranQ(within);

    expect(statistic).toBeCloseTo(reference.cochran.statistic, 12);
    expect(degreesOfFreedom).toBe(2);
    expect(pValue).toBeCloseTo(reference.cochran.pValue, 13);
  });

  it("is McNemar's uncorrected statistic for two formulas", () => {
    const { onlyFirst, onlySecond } = mcNemarWithin(first, second, 0.25);
    const { statistic } = cochranQ(within.map(([a = false, b = false]) => [a, b]));

    expect(statistic).toBeCloseTo((onlyFirst - onlySecond) ** 2 / (onlyFirst + onlySecond), 12);
  });

  it('says nothing where no eye differs', () => {
    const rows = [
      [true, true],
      [false, false],
    ];

    expect(cochranQ(rows)).toEqual({ statistic: 0, degreesOfFreedom: 1, pValue: 1 });
  });

  it('refuses no eyes, one formula and ragged rows', () => {
    expect(() => cochranQ([])).toThrow(TooFewValuesError);
    expect(() => cochranQ([[true]])).toThrow(TooFewValuesError);
    expect(() => cochranQ([[true, false], [true]])).toThrow(UnequalLengthsError);
  });
});
