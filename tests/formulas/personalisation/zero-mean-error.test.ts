import * as fc from 'fast-check';
import {
  formulaIds,
  hardLimits,
  MixedOriginsError,
  NoConstantError,
  OutOfRangeError,
  predictRefraction,
  sortCases,
  TooFewValuesError,
  UnusableCaseError,
  withPersonalValue,
  WrongConstantsError,
  zeroMeanErrorConstant,
} from '@/formulas';
import { prepareCohort, refractionPerMm } from '@/formulas/personalisation/cohort';
import { bootstrapPercentile } from '@/formulas/statistics/bootstrap';
import { mean } from '@/formulas/statistics/mean-and-deviation';
import { simulatedCases } from '../support/cohorts';
import { anyEye, anyFormulaWithConstants, averageConstants, averageEye } from '../support/eyes';
import { seededRandom } from '../support/seeded-random';
import type { FormulaId, LensConstants, OutcomeCase } from '@/formulas';

const errorsOf = (formula: FormulaId, cases: OutcomeCase[], constants: LensConstants) =>
  cases.map(
    ({ eye, powerD, achievedD }) =>
      achievedD - predictRefraction(formula, eye, powerD, constants).refractionD,
  );
const shifted = (formula: FormulaId, by: number) =>
  withPersonalValue(formula, averageConstants[formula], personal(formula) + by);
const personal = (formula: FormulaId) => Object.values(averageConstants[formula])[0] as number;

describe.each(formulaIds)('the constant of zero mean error, %s', (formula) => {
  const cases = simulatedCases({ formula, count: 120, random: seededRandom(3) });

  it('makes the mean of the predictions of the door right', () => {
    const zeroed = zeroMeanErrorConstant({
      formula,
      cases,
      origin: 'optical',
      published: shifted(formula, 0.3),
    });
    const errors = errorsOf(formula, cases, zeroed.constants);

    expect(Math.abs(mean(errors))).toBeLessThan(1e-9);
    zeroed.errorsD.forEach((errorD, index) => expect(errorD).toBeCloseTo(errors[index]!, 9));
    expect(zeroed.meanErrorBeforeD).toBeCloseTo(mean(errorsOf(formula, cases, shifted(formula, 0.3))), 10);
    expect(zeroed).toMatchObject({ formula, origin: 'optical', caseCount: 120, patientCount: 120 });
  });

  it('finds the true constant of eyes without scatter', () => {
    const exact = simulatedCases({ formula, count: 20, random: seededRandom(4), noiseD: 0 });
    const zeroed = zeroMeanErrorConstant({
      formula,
      cases: exact,
      origin: 'optical',
      published: shifted(formula, -0.7),
    });

    expect(zeroed.value).toBeCloseTo(personal(formula), 9);
    expect(zeroed.standardError).toBeLessThan(1e-8);
    expect(zeroed.constants).toEqual(withPersonalValue(formula, averageConstants[formula], zeroed.value));
  });

  it('does not depend on the constant it starts from, nor on the order of the cases', () => {
    const question = { formula, cases, origin: 'optical', published: averageConstants[formula] } as const;
    const { value } = zeroMeanErrorConstant(question);

    expect(zeroMeanErrorConstant({ ...question, published: shifted(formula, 1.5) }).value).toBeCloseTo(
      value,
      9,
    );
    expect(zeroMeanErrorConstant({ ...question, cases: [...cases].reverse() }).value).toBeCloseTo(value, 9);
  });

  it('rises with more hyperopic results', () => {
    const question = { formula, cases, origin: 'optical', published: averageConstants[formula] } as const;
    const more = cases.map((one) => ({ ...one, achievedD: one.achievedD + 0.25 }));
    const { value, refractionPerUnitD } = zeroMeanErrorConstant(question);

    // To first order by 0.25 D over the change per unit.
    expect(
      (zeroMeanErrorConstant({ ...question, cases: more }).value - value) * refractionPerUnitD,
    ).toBeCloseTo(0.25, 2);
  });

  it('has the standard error that resampling gives', () => {
    const question = { formula, origin: 'optical', published: averageConstants[formula] } as const;
    const { standardError, interval, value } = zeroMeanErrorConstant({ ...question, cases });
    const resampled = bootstrapPercentile(
      cases,
      (sample) => zeroMeanErrorConstant({ ...question, cases: sample }).value,
      { seed: 5, resamples: 400 },
    );

    expect((resampled.high - resampled.low) / (2 * 1.96 * standardError)).toBeGreaterThan(0.85);
    expect((resampled.high - resampled.low) / (2 * 1.96 * standardError)).toBeLessThan(1.15);
    expect((interval.low + interval.high) / 2).toBeCloseTo(value, 12);
  });

  it('holds the true constant in its 95 % interval in 93 to 97 % of 500 cohorts', () => {
    const random = seededRandom(2024);
    let held = 0;
    for (let cohort = 0; cohort < 500; cohort += 1) {
      const drawn = simulatedCases({ formula, count: 30, random });
      const { interval } = zeroMeanErrorConstant({
        formula,
        cases: drawn,
        origin: 'optical',
        published: shifted(formula, 0.2),
      });
      if (interval.low <= personal(formula) && interval.high >= personal(formula)) held += 1;
    }

    expect(held / 500).toBeGreaterThanOrEqual(0.93);
    expect(held / 500).toBeLessThanOrEqual(0.97);
  });
});

describe('both eyes of patients', () => {
  const published = averageConstants.srkt;

  it('widen the interval, which then holds the true constant as often as it says', () => {
    const random = seededRandom(77);
    let [related, asIfAlone] = [0, 0];
    for (let cohort = 0; cohort < 500; cohort += 1) {
      const cases = simulatedCases({ formula: 'srkt', count: 60, random, noiseD: 0.2, sharedD: 0.35 });
      const holds = (drawn: OutcomeCase[]) => {
        const { interval } = zeroMeanErrorConstant({
          formula: 'srkt',
          cases: drawn,
          origin: 'optical',
          published,
        });
        return interval.low <= 118.9 && interval.high >= 118.9;
      };
      if (holds(cases)) related += 1;
      if (holds(cases.map((one) => ({ ...one, patient: undefined })))) asIfAlone += 1;
    }

    expect(related / 500).toBeGreaterThanOrEqual(0.93);
    expect(related / 500).toBeLessThanOrEqual(0.97);
    expect(asIfAlone / 500).toBeLessThan(0.89);
  });

  it('are counted as eyes and as patients', () => {
    const cases = simulatedCases({ formula: 'srkt', count: 40, random: seededRandom(6), sharedD: 0.3 });
    const zeroed = zeroMeanErrorConstant({ formula: 'srkt', cases, origin: 'optical', published });

    expect(zeroed).toMatchObject({ caseCount: 40, patientCount: 20 });
    expect(zeroed.designEffect).toBeGreaterThan(1);
  });

  it('are not mistaken for the eyes of cases without a patient', () => {
    const cases = simulatedCases({ formula: 'srkt', count: 4, random: seededRandom(6) });
    const named = cases.map((one, index) => (index < 2 ? { ...one, patient: '0' } : one));

    expect(
      zeroMeanErrorConstant({ formula: 'srkt', cases: named, origin: 'optical', published }).patientCount,
    ).toBe(3);
  });
});

describe('refusals', () => {
  const formula = 'srkt';
  const published = averageConstants.srkt;
  const cases = simulatedCases({ formula, count: 10, random: seededRandom(9) });
  const thrownBy = (work: () => unknown): unknown => {
    try {
      return work();
    } catch (error) {
      return error;
    }
  };

  it('optical and ultrasound cases are never pooled', () => {
    const mixed = cases.map((one, index) => (index === 7 ? { ...one, origin: 'ultrasound' as const } : one));
    const error = thrownBy(() =>
      zeroMeanErrorConstant({ formula, cases: mixed, origin: 'optical', published }),
    );

    expect(error).toBeInstanceOf(MixedOriginsError);
    expect(error).toMatchObject({ caseIndex: 7, expected: 'optical', found: 'ultrasound' });
  });

  it('nor does a constant of one kind take cases of the other', () => {
    expect(() => zeroMeanErrorConstant({ formula, cases, origin: 'ultrasound', published })).toThrow(
      MixedOriginsError,
    );
  });

  it('a case that the formula refuses is named, not left out', () => {
    const spoilt = cases.map((one, index) => (index === 4 ? { ...one, powerD: NaN } : one));
    const error = thrownBy(() =>
      zeroMeanErrorConstant({ formula, cases: spoilt, origin: 'optical', published }),
    );

    expect(error).toBeInstanceOf(UnusableCaseError);
    expect(error).toMatchObject({ caseIndex: 4, cause: expect.any(OutOfRangeError) });
  });

  it.each([
    ['achievedD', { achievedD: 25 }],
    ['achievedD', { achievedD: NaN }],
    ['axialLengthMm', { eye: { ...averageEye, axialLengthMm: 235 } }],
  ])('an impossible %s is refused', (input, change) => {
    const spoilt = [{ ...cases[0]!, ...change }, ...cases];
    const error = thrownBy(() =>
      zeroMeanErrorConstant({ formula, cases: spoilt, origin: 'optical', published }),
    );

    expect(error).toMatchObject({ name: 'UnusableCaseError', caseIndex: 0, cause: { input } });
  });

  it('cases can be sorted out beforehand, with the reason', () => {
    const withoutDepth = cases.map((one, index) =>
      index % 5 === 0 ? { ...one, eye: { ...one.eye, anteriorChamberDepthMm: undefined } } : one,
    );
    const question = {
      formula: 'haigis',
      cases: withoutDepth,
      origin: 'optical',
      published: averageConstants.haigis,
    } as const;
    const { usable, refused } = sortCases(question);

    expect(usable).toHaveLength(8);
    expect(refused.map(({ caseIndex, message }) => [caseIndex, message])).toEqual([
      [0, 'Case 0: haigis needs anteriorChamberDepthMm'],
      [5, 'Case 5: haigis needs anteriorChamberDepthMm'],
    ]);
    expect(() => zeroMeanErrorConstant(question)).toThrow(UnusableCaseError);
  });

  it('constants of another formula', () => {
    expect(() =>
      zeroMeanErrorConstant({ formula, cases, origin: 'optical', published: averageConstants.hofferQ }),
    ).toThrow(WrongConstantsError);
  });

  it('fewer than two cases, or two eyes of one patient', () => {
    expect(() => zeroMeanErrorConstant({ formula, cases: [], origin: 'optical', published })).toThrow(
      TooFewValuesError,
    );
    expect(() =>
      zeroMeanErrorConstant({ formula, cases: cases.slice(0, 1), origin: 'optical', published }),
    ).toThrow(TooFewValuesError);
    const bothEyes = cases.slice(0, 2).map((one) => ({ ...one, patient: 'a' }));
    expect(() => zeroMeanErrorConstant({ formula, cases: bothEyes, origin: 'optical', published })).toThrow(
      /patients/,
    );
  });

  it('results that no constant explains', () => {
    const wild = cases.map((one) => ({ ...one, achievedD: one.achievedD + 18 }));

    expect(() => zeroMeanErrorConstant({ formula, cases: wild, origin: 'optical', published })).toThrow(
      NoConstantError,
    );
  });

  it('lenses whose place has no effect', () => {
    const planoLenses = cases.map((one) => ({ ...one, powerD: 0 }));

    expect(() =>
      zeroMeanErrorConstant({ formula, cases: planoLenses, origin: 'optical', published }),
    ).toThrow(NoConstantError);
  });
});

describe('properties', () => {
  it('the mean error is 0 to 1e-9 for any cohort that has a constant', () => {
    const outcome = fc.double({ min: -1.5, max: 1.5, noNaN: true });
    let found = 0;
    fc.assert(
      fc.property(
        anyFormulaWithConstants,
        fc.array(fc.tuple(anyEye, outcome), { minLength: 2, maxLength: 12 }),
        ({ formula, constants }, drawn) => {
          const cases = drawn.map(([eye, offD]) => ({
            eye,
            powerD: 20,
            achievedD: predictRefraction(formula, eye, 20, constants).refractionD + offD,
            origin: 'optical' as const,
          }));
          fc.pre(cases.every(({ achievedD }) => Math.abs(achievedD) < hardLimits.targetD.max));
          let zeroed;
          try {
            zeroed = zeroMeanErrorConstant({ formula, cases, origin: 'optical', published: constants });
          } catch (error) {
            // Some eyes at the edge of the possible have none; never a wrong one.
            expect(error).toBeInstanceOf(NoConstantError);
            return;
          }

          found += 1;
          expect(Math.abs(mean(errorsOf(formula, cases, zeroed.constants)))).toBeLessThan(1e-9);
        },
      ),
    );
    expect(found).toBeGreaterThan(50);
  });

  it('the change of refraction per mm agrees with differences', () => {
    fc.assert(
      fc.property(
        anyFormulaWithConstants,
        anyEye,
        fc.double({ min: -10, max: 35, noNaN: true }),
        ({ formula, constants }, eye, powerD) => {
          const cases = [{ eye, powerD, achievedD: 0, origin: 'optical' as const }];
          const cohort = prepareCohort({ formula, cases, origin: 'optical', published: constants });
          const first = cohort.eyes[0]!;
          const step = 1e-5;
          const at = (by: number) =>
            predictRefraction(
              formula,
              eye,
              powerD,
              withPersonalValue(formula, constants, cohort.publishedValue + by / cohort.planePerUnitMm),
            ).refractionD;
          const byDifferences = (at(step) - at(-step)) / (2 * step);

          expect(refractionPerMm(cohort, first, first.optics.lensPlaneMm)).toBeCloseTo(byDifferences, 5);
        },
      ),
    );
  });
});
