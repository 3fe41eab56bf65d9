import {
  DegenerateDataError,
  haigisTriple,
  MixedOriginsError,
  outOfSampleEffect,
  powerForRefraction,
  predictRefraction,
  TooFewValuesError,
} from '@/formulas';
import { fitTriple } from '@/formulas/personalisation/haigis-triple';
import { mean, sampleSd } from '@/formulas/statistics/mean-and-deviation';
import { simulatedCases } from '../support/cohorts';
import { averageConstants } from '../support/eyes';
import { seededRandom } from '../support/seeded-random';

const truth = { a0Mm: -1.6, a1: 0.45, a2: 0.225 };
const published = averageConstants.haigis;
const casesOf = (seed: number, more: Partial<Parameters<typeof simulatedCases>[0]> = {}) =>
  simulatedCases({
    formula: 'haigis',
    count: 300,
    random: seededRandom(seed),
    constants: truth,
    axialLengthSdMm: 1.4,
    ...more,
  });

describe('the Haigis triple', () => {
  it('is found exactly where eyes do not scatter', () => {
    const { constants, withoutPosition } = haigisTriple({
      cases: casesOf(1, { noiseD: 0 }),
      origin: 'optical',
      published,
    });

    expect(constants.a0Mm).toBeCloseTo(truth.a0Mm, 6);
    expect(constants.a1).toBeCloseTo(truth.a1, 7);
    expect(constants.a2).toBeCloseTo(truth.a2, 8);
    expect(withoutPosition).toBe(0);
  });

  it('zeroes the mean error afterwards', () => {
    const { zeroed, constants } = haigisTriple({ cases: casesOf(2), origin: 'optical', published });

    expect(Math.abs(mean(zeroed.errorsD))).toBeLessThan(1e-9);
    expect(zeroed.constants).toEqual(constants);
  });

  it('holds the true slopes within two standard errors in 93 to 97 % of cohorts', () => {
    const cohorts = 300;
    let [ofDepth, ofLength] = [0, 0];
    for (let cohort = 0; cohort < cohorts; cohort += 1) {
      const fit = fitTriple({ cases: casesOf(1000 + cohort), origin: 'optical', published });
      if (Math.abs(fit.constants.a1 - truth.a1) < 1.968 * fit.a1StandardError) ofDepth += 1;
      if (Math.abs(fit.constants.a2 - truth.a2) < 1.968 * fit.a2StandardError) ofLength += 1;
    }

    for (const held of [ofDepth, ofLength]) {
      expect(held / cohorts).toBeGreaterThan(0.925);
      expect(held / cohorts).toBeLessThan(0.98);
    }
  });

  it('is not ruled by long eyes, whose weak lenses hardly show where they lie', () => {
    const offLength = Array.from({ length: 20 }, (_, seed) => {
      const random = seededRandom(seed);
      const usual = simulatedCases({ formula: 'haigis', count: 250, random, constants: truth, noiseD: 0.3 });
      const long = simulatedCases({ formula: 'haigis', count: 50, random }).map((one) => {
        const eye = { ...one.eye, axialLengthMm: 29 + 0.5 * random.normal() };
        const powerD = Math.max(3, Math.round(powerForRefraction('haigis', eye, -1, truth).powerD));
        const { refractionD } = predictRefraction('haigis', eye, powerD, truth);
        return { ...one, eye, powerD, achievedD: refractionD + 0.3 * random.normal() };
      });
      const { constants } = fitTriple({ cases: [...usual, ...long], origin: 'optical', published });
      return constants.a2 - truth.a2;
    });

    // 0.011; unweighted 0.021, as 50 lenses of 3 to 5 D then bring more noise than 250 others.
    expect(sampleSd(offLength)).toBeLessThan(0.015);
    expect(Math.abs(mean(offLength))).toBeLessThan(0.008);
  });

  it('needs 250 eyes of short and long', () => {
    expect(() => haigisTriple({ cases: casesOf(7, { count: 249 }), origin: 'optical', published })).toThrow(
      new TooFewValuesError('Haigis triple', 249, 250),
    );
    expect(() =>
      haigisTriple({ cases: casesOf(7, { axialLengthSdMm: 0.7 }), origin: 'optical', published }),
    ).toThrow(DegenerateDataError);
  });

  it('never pools optical and ultrasound eyes', () => {
    const cases = casesOf(8).map((one, index) =>
      index === 3 ? { ...one, origin: 'ultrasound' as const } : one,
    );

    expect(() => haigisTriple({ cases, origin: 'optical', published })).toThrow(MixedOriginsError);
  });

  it('shows its worth on eyes that it was not fitted to', () => {
    const question = {
      formula: 'haigis',
      cases: casesOf(9, { noiseD: 0.3 }),
      origin: 'optical',
      published,
    } as const;
    const triple = outOfSampleEffect({ ...question, method: 'haigisTriple' });
    const single = outOfSampleEffect(question);

    expect(triple.after.sdD).toBeLessThan(single.after.sdD);
    expect(triple.after.meanAbsoluteD).toBeLessThan(triple.before.meanAbsoluteD);
    expect(triple.after.sdD).toBeGreaterThan(0.25);
  });

  it('is no method of another formula', () => {
    expect(() =>
      outOfSampleEffect({
        formula: 'srkt',
        cases: casesOf(9),
        origin: 'optical',
        published: averageConstants.srkt,
        method: 'haigisTriple',
      }),
    ).toThrow(/does not belong to srkt/);
  });
});
