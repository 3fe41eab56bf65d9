import * as fc from 'fast-check';
import {
  formulaIds,
  normalCdf,
  OutOfRangeError,
  PRIOR_SD_D,
  shrinkToPublished,
  zeroMeanErrorConstant,
} from '@/formulas';
import { expectedErrorSdD, ownWeight, pooledSdD } from '@/formulas/personalisation/expected-error';
import { findRoot } from '@/formulas/solvers/root';
import { simulatedCases } from '../support/cohorts';
import { averageConstants } from '../support/eyes';
import { seededRandom } from '../support/seeded-random';

const zeroedOf = (seed: number, count: number, aConstant = 119.2) =>
  zeroMeanErrorConstant({
    formula: 'srkt',
    cases: simulatedCases({ formula: 'srkt', count, random: seededRandom(seed), constants: { aConstant } }),
    origin: 'optical',
    published: averageConstants.srkt,
  });

describe('the prior', () => {
  it('is what the audit implies: 83.4 % within 1 D with offsets, 87.0 % without', () => {
    const sdFor = (share: number) =>
      findRoot((sd) => 2 * normalCdf(1 / sd) - 1 - share, { low: 0.1, high: 3, tolerance: 1e-9 }).value;

    expect(sdFor(0.87)).toBeCloseTo(0.66, 3);
    expect(sdFor(0.834)).toBeCloseTo(0.722, 3);
    expect(Math.sqrt(sdFor(0.834) ** 2 - sdFor(0.87) ** 2)).toBeCloseTo(PRIOR_SD_D, 2);
  });
});

describe('shrinkage', () => {
  it('lies between the published and the own constant', () => {
    fc.assert(
      fc.property(
        fc.nat(5000),
        fc.integer({ min: 2, max: 60 }),
        fc.constantFrom(...formulaIds),
        fc.double({ min: 0.02, max: 1, noNaN: true }),
        (seed, count, formula, priorSdD) => {
          const zeroed = zeroMeanErrorConstant({
            formula,
            cases: simulatedCases({ formula, count, random: seededRandom(seed) }),
            origin: 'optical',
            published: averageConstants[formula],
          });
          const { value, weightOfOwn, interval } = shrinkToPublished(zeroed, { priorSdD });
          const [low, high] = [zeroed.publishedValue, zeroed.value].sort((a, b) => a - b) as [number, number];

          expect(value).toBeGreaterThanOrEqual(low);
          expect(value).toBeLessThanOrEqual(high);
          expect(weightOfOwn).toBeGreaterThan(0);
          expect(weightOfOwn).toBeLessThan(1);
          expect(interval.low).toBeLessThan(value);
          expect(interval.high).toBeGreaterThan(value);
        },
      ),
    );
  });

  it('is τ²/(τ² + SE²), with own and expected scatter behind SE', () => {
    const zeroed = zeroedOf(1, 40);
    const { weightOfOwn, value, standardDeviation, priorSd } = shrinkToPublished(zeroed);
    const variance = (39 * zeroed.sdD ** 2 + 30 * 0.45 ** 2) / 69 / 40;

    expect(weightOfOwn).toBeCloseTo(0.29 ** 2 / (0.29 ** 2 + variance), 12);
    expect(value).toBeCloseTo(118.9 + weightOfOwn * (zeroed.value - 118.9), 12);
    expect(priorSd).toBeCloseTo(0.29 / zeroed.refractionPerUnitD, 12);
    expect(standardDeviation).toBeCloseTo(
      1 / Math.sqrt(1 / priorSd ** 2 + zeroed.refractionPerUnitD ** 2 / variance),
      12,
    );
  });

  it('trusts more cases more, and ends at the own constant', () => {
    const weights = [4, 20, 50, 250].map((count) => shrinkToPublished(zeroedOf(2, count)).weightOfOwn);

    expect([...weights].sort()).toEqual(weights);
    expect(weights[1]).toBeGreaterThan(0.8);
    expect(weights[3]).toBeGreaterThan(0.99);
  });

  it('is not taken in by two eyes that agree', () => {
    const [one] = simulatedCases({ formula: 'srkt', count: 1, random: seededRandom(3) });
    const cases = [one!, one!].map((each) => ({ ...each, achievedD: each.achievedD + 0.8 }));
    const zeroed = zeroMeanErrorConstant({
      formula: 'srkt',
      cases,
      origin: 'optical',
      published: averageConstants.srkt,
    });

    expect(zeroed.standardError).toBeLessThan(1e-9);
    expect(shrinkToPublished(zeroed).weightOfOwn).toBeLessThan(0.5);
  });

  it('lands closer to the truth than either end when cases are few', () => {
    const random = seededRandom(11);
    const squares = { own: 0, published: 0, shrunk: 0 };
    let held = 0;
    const rounds = 1000;
    for (let round = 0; round < rounds; round += 1) {
      // Surgeons scatter about the published constant as the prior says.
      const aConstant = 118.9 + (0.29 / 0.84) * random.normal();
      const cases = simulatedCases({
        formula: 'srkt',
        count: 6,
        random,
        constants: { aConstant },
        noiseD: 0.45,
      });
      const zeroed = zeroMeanErrorConstant({
        formula: 'srkt',
        cases,
        origin: 'optical',
        published: averageConstants.srkt,
      });
      const shrunk = shrinkToPublished(zeroed);
      squares.own += (zeroed.value - aConstant) ** 2;
      squares.published += (118.9 - aConstant) ** 2;
      squares.shrunk += (shrunk.value - aConstant) ** 2;
      if (shrunk.interval.low <= aConstant && shrunk.interval.high >= aConstant) held += 1;
    }

    expect(squares.shrunk).toBeLessThan(0.85 * squares.own);
    expect(squares.shrunk).toBeLessThan(0.5 * squares.published);
    expect(Math.abs(held / rounds - 0.95)).toBeLessThan(0.02);
  });

  it('trusts related eyes less', () => {
    const zeroed = zeroedOf(4, 40);

    expect(shrinkToPublished({ ...zeroed, designEffect: 1.8 }).weightOfOwn).toBeLessThan(
      shrinkToPublished(zeroed).weightOfOwn,
    );
  });

  it('refuses a prior without width', () => {
    expect(() => shrinkToPublished(zeroedOf(5, 10), { priorSdD: 0 })).toThrow(OutOfRangeError);
    expect(() => shrinkToPublished(zeroedOf(5, 10), { expectedSdD: NaN })).toThrow(OutOfRangeError);
  });
});

describe('the expected error', () => {
  it('is blended with own cases by their degrees of freedom', () => {
    expect(ownWeight(1)).toBe(0);
    expect(ownWeight(31)).toBe(0.5);
    expect(pooledSdD({ ownSdD: 9, caseCount: 1, expectedSdD: 0.45 })).toBeCloseTo(0.45, 15);
    expect(pooledSdD({ ownSdD: 0.6, caseCount: 31, expectedSdD: 0.4 })).toBeCloseTo(Math.sqrt(0.26), 12);
    expect(pooledSdD({ ownSdD: 0.38, caseCount: 3000, expectedSdD: 0.45 })).toBeCloseTo(0.381, 3);
    expect(expectedErrorSdD).toEqual({ optical: 0.45, ultrasound: 0.66 });
  });

  it('needs a case', () => expect(() => ownWeight(0)).toThrow(OutOfRangeError));
});
