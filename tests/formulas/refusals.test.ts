import * as fc from 'fast-check';
import {
  defaultSpread,
  formulaIds,
  InvalidOptionError,
  landing,
  MissingInputError,
  OutOfRangeError,
  planToric,
  powerForRefraction,
  predictRefraction,
  spreadOfOwnResults,
  surgeonFactorFromAConstant,
  WrongConstantsError,
} from '@/formulas';
import { finite } from '@/formulas/units/number';
import { anEye, averageConstants, averageEye } from './support/eyes';
import type { EyeGeometry, FormulaId, FormulaOptions, LensConstants } from '@/formulas';

/** The error that the act throws. */
function thrownBy(act: () => unknown): unknown {
  try {
    act();
  } catch (error) {
    return error;
  }
  throw new Error('nothing was thrown');
}

function expectOutOfRange(act: () => unknown, expected: { input: string; value: number; limit: number }) {
  const error = thrownBy(act);
  expect(error).toBeInstanceOf(OutOfRangeError);
  expect(error).toMatchObject({ name: 'OutOfRangeError', ...expected });
  expect((error as Error).message).toContain(expected.input);
}

const radius = (keratometryD: number) => 337.5 / keratometryD;

describe('hard limits of the eye', () => {
  it.each<[keyof EyeGeometry, number, number]>([
    ['axialLengthMm', 13.99, 14],
    ['axialLengthMm', 40.01, 40],
    ['axialLengthMm', NaN, 14],
    ['axialLengthMm', Infinity, 40],
    ['flatRadiusMm', radius(65.1), radius(65)],
    ['flatRadiusMm', radius(24.9), radius(25)],
    ['steepRadiusMm', radius(65.1), radius(65)],
    ['steepRadiusMm', radius(24.9), radius(25)],
    ['anteriorChamberDepthMm', 1.49, 1.5],
    ['anteriorChamberDepthMm', 6.01, 6],
  ])('%s %d in every formula and direction', (input, value, limit) => {
    for (const formula of formulaIds) {
      const eye = { ...averageEye, [input]: value };

      expectOutOfRange(() => predictRefraction(formula, eye, 21, averageConstants[formula]), {
        input,
        value,
        limit,
      });
      expectOutOfRange(() => powerForRefraction(formula, eye, 0, averageConstants[formula]), {
        input,
        value,
        limit,
      });
    }
  });

  it('takes the limits themselves', () => {
    for (const axialLengthMm of [14, 40]) {
      expect(() =>
        predictRefraction('t2', { ...averageEye, axialLengthMm }, 10, { aConstant: 118.9 }),
      ).not.toThrow();
    }
    expect(() => predictRefraction('hofferQ', anEye(24, 25), 10, { pAcdMm: 5 })).not.toThrow();
    expect(() => predictRefraction('hofferQ', anEye(24, 65), 10, { pAcdMm: 3 })).not.toThrow();
  });

  it('refuses an eye without a corneal radius', () => {
    const eye = { axialLengthMm: 23.5, flatRadiusMm: 7.7 } as EyeGeometry;

    expect(thrownBy(() => predictRefraction('srkt', eye, 21, { aConstant: 118.9 }))).toMatchObject({
      name: 'OutOfRangeError',
      input: 'steepRadiusMm',
    });
  });
});

describe('hard limits of lens and question', () => {
  it.each<[FormulaId, LensConstants, string, number, number]>([
    ['srkt', { aConstant: 109.9 }, 'aConstant', 109.9, 110],
    ['srkt', { aConstant: 125.1 }, 'aConstant', 125.1, 125],
    ['t2', { aConstant: NaN }, 'aConstant', NaN, 110],
    ['holladay1', { surgeonFactorMm: -3.6 }, 'surgeonFactorMm', -3.6, -3.5],
    ['holladay1', { surgeonFactorMm: 6.1 }, 'surgeonFactorMm', 6.1, 6],
    ['hofferQ', { pAcdMm: 0.1 }, 'pAcdMm', 0.1, 0.2],
    ['hofferQ', { pAcdMm: 9.3 }, 'pAcdMm', 9.3, 9.2],
    ['haigis', { a0Mm: 11, a1: 0.4, a2: 0.1 }, 'a0Mm', 11, 10],
    ['haigis', { a0Mm: 1, a1: -3, a2: 0.1 }, 'a1', -3, -2],
    ['haigis', { a0Mm: 1, a1: 0.4, a2: 2.1 }, 'a2', 2.1, 2],
  ])('%s %j', (formula, constants, input, value, limit) => {
    expectOutOfRange(() => predictRefraction(formula, averageEye, 21, constants), { input, value, limit });
  });

  it.each([
    [-30.5, -30],
    [60.5, 60],
    [NaN, -30],
  ])('power %d D', (value, limit) => {
    const act = () => predictRefraction('srkt', averageEye, value, { aConstant: 118.9 });

    expectOutOfRange(act, { input: 'powerD', value, limit });
  });

  it.each([
    [-21, -20],
    [21, 20],
    [NaN, -20],
  ])('target %d D', (value, limit) => {
    const act = () => powerForRefraction('srkt', averageEye, value, { aConstant: 118.9 });

    expectOutOfRange(act, { input: 'targetD', value, limit });
  });

  it.each<[FormulaOptions, string, number, number]>([
    [{ vertexMm: -1 }, 'vertexMm', -1, 0],
    [{ vertexMm: 21 }, 'vertexMm', 21, 20],
    [{ elpCornea: { flatRadiusMm: 14, steepRadiusMm: 7.6 } }, 'elpCornea.flatRadiusMm', 14, 13.5],
    [{ elpCornea: { flatRadiusMm: 7.7, steepRadiusMm: 5 } }, 'elpCornea.steepRadiusMm', 5, radius(65)],
  ])('option %j', (options, input, value, limit) => {
    const act = () => predictRefraction('srkt', averageEye, 21, { aConstant: 118.9 }, options);

    expectOutOfRange(act, { input, value, limit });
  });

  it('constants and eye that put the lens in front of the cornea', () => {
    const act = () => predictRefraction('haigis', averageEye, 21, { a0Mm: -9, a1: 0.3, a2: 0.1 });
    expect(thrownBy(act)).toMatchObject({ name: 'OutOfRangeError', input: 'elpMm', limit: 0 });
  });

  it('constants that put the lens behind the middle of the eye', () => {
    const act = () => predictRefraction('haigis', averageEye, 21, { a0Mm: 10, a1: 2, a2: 1 });

    expect(thrownBy(act)).toMatchObject({
      name: 'OutOfRangeError',
      input: 'elpMm',
      limit: averageEye.axialLengthMm / 2,
    });
  });

  it('a lens so strong that no spectacle lens could be put in front of the eye', () => {
    const act = () => predictRefraction('t2', anEye(40, 65), 60, { aConstant: 118.9 }, { vertexMm: 20 });

    expect(thrownBy(act)).toBeInstanceOf(OutOfRangeError);
  });

  it('a constant to convert', () => {
    expectOutOfRange(() => surgeonFactorFromAConstant(12), { input: 'aConstant', value: 12, limit: 110 });
  });
});

describe('what is missing or of the wrong kind', () => {
  it('Haigis without an anterior chamber depth', () => {
    const { anteriorChamberDepthMm, ...eye } = averageEye;
    expect(anteriorChamberDepthMm).toBe(3.1);

    const error = thrownBy(() => predictRefraction('haigis', eye, 21, averageConstants.haigis));

    expect(error).toBeInstanceOf(MissingInputError);
    expect(error).toMatchObject({ input: 'anteriorChamberDepthMm', formula: 'haigis' });
  });

  it('the others do without it', () => {
    const { anteriorChamberDepthMm, ...eye } = averageEye;
    expect(anteriorChamberDepthMm).toBe(3.1);
    for (const formula of formulaIds.filter((id) => id !== 'haigis')) {
      expect(() => predictRefraction(formula, eye, 21, averageConstants[formula])).not.toThrow();
    }
  });

  const foreign = formulaIds.flatMap((formula) =>
    formulaIds.filter((other) => !isSameKind(formula, other)).map((other) => ({ formula, other })),
  );
  it.each(foreign)("$formula with $other's constants", ({ formula, other }) => {
    const error = thrownBy(() => predictRefraction(formula, averageEye, 21, averageConstants[other]));

    expect(error).toBeInstanceOf(WrongConstantsError);
    expect(error).toMatchObject({ formula, input: 'constants', given: Object.keys(averageConstants[other]) });
  });

  it('an incomplete Haigis triple', () => {
    const constants = { a0Mm: 1, a1: 0.4 } as LensConstants;

    expect(thrownBy(() => predictRefraction('haigis', averageEye, 21, constants))).toBeInstanceOf(
      WrongConstantsError,
    );
  });

  it.each([
    () => predictRefraction('srk2' as FormulaId, averageEye, 21, { aConstant: 118.9 }),
    () => predictRefraction('toString' as FormulaId, averageEye, 21, { aConstant: 118.9 }),
    () =>
      predictRefraction(
        'srkt',
        averageEye,
        21,
        { aConstant: 118.9 },
        { axialLengthAdjustment: 'x' as 'none' },
      ),
    () =>
      predictRefraction(
        'srkt',
        averageEye,
        21,
        { aConstant: 118.9 },
        { srktNegativeRadicand: 'x' as 'zero' },
      ),
    () => planToric({ ...toricQuestion, posteriorCornea: 'x' as 'none' }),
    () => defaultSpread('x' as 'optical'),
    () => defaultSpread('optical', { hasOpticalFailed: true }),
  ])('a choice that does not exist or contradicts another (%#)', (act) => {
    expect(thrownBy(act)).toBeInstanceOf(InvalidOptionError);
  });
});

const toricQuestion = {
  formula: 'srkt',
  eye: anEye(23.5, 43, 45),
  steepAxisDeg: 90,
  constants: { aConstant: 118.9 },
  siaD: 0.2,
  incisionAxisDeg: 120,
  posteriorCornea: 'none',
  lens: { powerD: 21, cylinderD: 2, axisDeg: 90 },
} as const;

describe('refusals of the toric plan', () => {
  it.each([
    [{ steepAxisDeg: 181 }, 'steepAxisDeg', 181, 180],
    [{ steepAxisDeg: -1 }, 'steepAxisDeg', -1, 0],
    [{ incisionAxisDeg: NaN }, 'incisionAxisDeg', NaN, 0],
    [{ siaD: -0.1 }, 'siaD', -0.1, 0],
    [{ siaD: 6 }, 'siaD', 6, 5],
    [{ lens: { powerD: 61, cylinderD: 2, axisDeg: 90 } }, 'lens.powerD', 61, 60],
    [{ lens: { powerD: 21, cylinderD: -2, axisDeg: 90 } }, 'lens.cylinderD', -2, 0],
    [{ lens: { powerD: 21, cylinderD: 2, axisDeg: 190 } }, 'lens.axisDeg', 190, 180],
    [{ eye: anEye(41, 43, 45) }, 'axialLengthMm', 41, 40],
    [{ eye: anEye(23.5, 45, 43) }, 'steepRadiusMm', radius(43), radius(45)],
  ])('%j', (change, input, value, limit) => {
    expectOutOfRange(() => planToric({ ...toricQuestion, ...change }), { input, value, limit });
  });
});

describe('refusals of the landing', () => {
  const spread = defaultSpread('optical');
  const question = {
    formula: 'srkt',
    eye: averageEye,
    powerD: 21,
    constants: { aConstant: 118.9 },
    spread,
  } as const;

  it('a power, a target and a tolerance outside their limits', () => {
    expectOutOfRange(() => landing({ ...question, powerD: 99 }), { input: 'powerD', value: 99, limit: 60 });
    const { chanceWithin } = landing(question);
    expectOutOfRange(() => chanceWithin(30, 0.5), { input: 'targetD', value: 30, limit: 20 });
    expectOutOfRange(() => chanceWithin(0, -0.5), { input: 'toleranceD', value: -0.5, limit: 0 });
    expectOutOfRange(() => chanceWithin(0, NaN), { input: 'toleranceD', value: NaN, limit: 0 });
  });

  it.each([-0.1, NaN])('an SD of %d', (sd) => {
    const parts = spread.parts.map((part) => ({ ...part, sd }));

    expect(thrownBy(() => landing({ ...question, spread: { parts } }))).toBeInstanceOf(OutOfRangeError);
  });

  it('own results from fewer than 30 eyes', () => {
    expectOutOfRange(() => spreadOfOwnResults(0.4, 29), { input: 'caseCount', value: 29, limit: 30 });
  });
});

describe('nothing but finite numbers leaves the door', () => {
  const anyNumber = (min: number, max: number) => fc.double({ min, max, noNaN: true });
  const anyLegalEye = fc.record({
    axialLengthMm: anyNumber(14, 40),
    flatRadiusMm: anyNumber(radius(65), radius(25)),
    steepRadiusMm: anyNumber(radius(65), radius(25)),
    anteriorChamberDepthMm: anyNumber(1.5, 6),
  });
  const extremeConstants: Record<FormulaId, fc.Arbitrary<LensConstants>> = {
    srkt: fc.record({ aConstant: anyNumber(110, 125) }),
    t2: fc.record({ aConstant: anyNumber(110, 125) }),
    holladay1: fc.record({ surgeonFactorMm: anyNumber(-3.5, 6) }),
    hofferQ: fc.record({ pAcdMm: anyNumber(0.2, 9.2) }),
    haigis: fc.record({ a0Mm: anyNumber(-10, 10), a1: anyNumber(-2, 2), a2: anyNumber(-2, 2) }),
  };

  it.each(formulaIds)(
    '%s at any legal input either answers with numbers or says what is out of range',
    (formula) => {
      fc.assert(
        fc.property(
          anyLegalEye,
          extremeConstants[formula],
          fc.record({ powerD: anyNumber(-30, 60), targetD: anyNumber(-20, 20), vertexMm: anyNumber(0, 20) }),
          fc.constantFrom('zero' as const, 'absolute' as const),
          (eye, constants, { powerD, targetD, vertexMm }, srktNegativeRadicand) => {
            const options = { vertexMm, srktNegativeRadicand };
            for (const act of [
              () => Object.values(predictRefraction(formula, eye, powerD, constants, options)),
              () => Object.values(powerForRefraction(formula, eye, targetD, constants, options)),
            ]) {
              try {
                for (const value of act().filter((each) => typeof each === 'number')) {
                  expect(Number.isFinite(value)).toBe(true);
                  expect(Object.is(value, -0)).toBe(false);
                }
              } catch (error) {
                if (!(error instanceof OutOfRangeError)) throw error;
                expect(error.input).not.toBe('');
              }
            }
          },
        ),
        { numRuns: 500 },
      );
    },
  );

  it('minus zero becomes zero and anything infinite is refused', () => {
    expect(Object.is(finite('powerD', -0), 0)).toBe(true);
    expectOutOfRange(() => finite('powerD', Infinity), {
      input: 'powerD',
      value: Infinity,
      limit: Number.MAX_VALUE,
    });
    expect(thrownBy(() => finite('powerD', NaN))).toBeInstanceOf(OutOfRangeError);
  });
});

function isSameKind(formula: FormulaId, other: FormulaId): boolean {
  return Object.keys(averageConstants[formula]).join() === Object.keys(averageConstants[other]).join();
}
