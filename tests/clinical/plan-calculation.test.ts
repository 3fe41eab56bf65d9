import { FORMULA_VERSION, formulaIds, predictRefraction, prepareLanding, defaultSpread } from '@/formulas';
import type { FormulaId } from '@/formulas';
import { planCalculationSchema } from '@/shared/contract';
import { anEye, PLAIN_VALUES, radiusOf } from './support/eyes';
import { A_CONSTANT, aLensModel, constantsFor } from './support/lenses';
import { calculate, theModel } from './support/plans';

const silencedOf = (given: Parameters<typeof theModel>[0]) =>
  theModel(given).silenced.map(({ formula, code }) => [formula, code]);
const everyFormula = (code: string) => formulaIds.map((formula) => [formula, code]);
const codesOf = (given: Parameters<typeof theModel>[0]) => theModel(given).notices.map(({ code }) => code);
const closestOf = (given: Parameters<typeof theModel>[0] = {}) =>
  theModel(given).candidates.find(({ isClosest }) => isClosest);

describe('the calculation of a plan', () => {
  it('fits its contract, and carries version, target and tolerance', () => {
    const calculation = calculate();

    expect(planCalculationSchema.parse(calculation)).toEqual(calculation);
    expect(calculation).toMatchObject({ formulaVersion: FORMULA_VERSION, targetD: -0.25, toleranceD: 0.5 });
  });

  it('predicts what each formula predicts through its own door', () => {
    const { candidates, constants } = theModel();
    const eye = {
      axialLengthMm: 23.51,
      flatRadiusMm: radiusOf(43.25),
      steepRadiusMm: radiusOf(44.1),
      anteriorChamberDepthMm: 3.12,
    };

    for (const { powerD, predictions } of candidates) {
      for (const { formula, refractionD, elpMm } of predictions) {
        const values = constants.find((constant) => constant.formula === formula)?.values ?? {
          aConstant: NaN,
        };
        const alone = predictRefraction(formula, eye, powerD, values);
        expect([refractionD, elpMm]).toEqual([alone.refractionD, alone.elpMm]);
      }
    }
    expect(candidates.length * formulaIds.length).toBeGreaterThanOrEqual(50);
  });

  it('names what the formulas received', () => {
    expect(
      calculate({
        values: {
          acdMm: 2.6,
          acdFrom: 'endothelium',
          cornealThicknessUm: 540,
          flatAxisDeg: 175,
          steepAxisDeg: null,
        },
      }).eye,
    ).toEqual({
      axialLengthMm: 23.51,
      flatRadiusMm: radiusOf(43.25),
      steepRadiusMm: radiusOf(44.1),
      meanKeratometryD: expect.closeTo(43.675, 9),
      cornealCylinderD: expect.closeTo(0.85, 9),
      steepAxisDeg: 85,
      anteriorChamberDepthMm: expect.closeTo(3.14, 9),
      method: 'optical',
    });
  });

  it('gives the power at which the leading formula meets the target', () => {
    const { exactPowers } = theModel();
    const exact = exactPowers.find(({ formula }) => formula === 'srkt');
    const eye = { axialLengthMm: 23.51, flatRadiusMm: radiusOf(43.25), steepRadiusMm: radiusOf(44.1) };

    expect(
      predictRefraction('srkt', eye, exact?.powerD ?? NaN, { aConstant: A_CONSTANT }).refractionD,
    ).toBeCloseTo(-0.25, 9);
    expect(exactPowers.map(({ formula }) => formula)).toEqual([...formulaIds]);
  });

  it('lands where the leading formula predicts, with the published spread of the method', () => {
    const closest = closestOf();
    const landings = prepareLanding({
      formula: 'srkt',
      eye: { axialLengthMm: 23.51, flatRadiusMm: radiusOf(43.25), steepRadiusMm: radiusOf(44.1) },
      constants: { aConstant: A_CONSTANT },
      spread: defaultSpread('optical'),
    });
    const expected = landings.at(closest?.powerD ?? NaN);

    expect(closest?.landing).toEqual({
      meanD: expected.meanD,
      sdD: expected.sdD,
      chance: expected.chanceWithin(-0.25, 0.5),
    });
    expect(closest?.landing.meanD).toBe(
      closest?.predictions.find(({ formula }) => formula === 'srkt')?.refractionD,
    );
    expect(closest?.landing.chance).toBeGreaterThan(0.6);
  });

  it('lists the parts of the spread at the closest power, largest first, that make up its deviation', () => {
    const { spreadParts } = theModel();
    const sizes = spreadParts.map(({ sdD }) => sdD);

    expect(sizes).toEqual([...sizes].sort((a, b) => b - a));
    expect(Math.hypot(...sizes)).toBeCloseTo(closestOf()?.landing.sdD ?? NaN, 12);
  });
});

describe('who leads', () => {
  const leads = (given: Parameters<typeof theModel>[0]) => theModel(given).leadingFormula;

  it('is the formula suggested for the axial length', () => {
    expect(leads({})).toBe('srkt');
    expect(leads({ values: { axialLengthMm: 21.4 } })).toBe('haigis');
    expect(leads({ values: { axialLengthMm: 27 } })).toBe('haigis');
  });

  it('is the next one suggested when the first is silent, and the plan says so', () => {
    const given = { values: { axialLengthMm: 21.4, acdMm: null, acdFrom: null } };

    expect(leads(given)).toBe('hofferQ');
    expect(theModel(given).notices[0]).toEqual({
      code: 'leading-formula-silent',
      message: 'Haigis should lead and is silent here; Hoffer Q leads in its place.',
    });
  });

  it('is the surgeon’s own, and when that is silent the suggested one', () => {
    expect(leads({ input: { leadingFormula: 't2' } })).toBe('t2');
    const silent = { input: { leadingFormula: 'haigis' as const }, values: { acdMm: null, acdFrom: null } };
    expect(leads(silent)).toBe('srkt');
    expect(codesOf(silent)).toEqual(['leading-formula-silent']);
  });

  it('is any that speaks when no suggested one was asked', () => {
    expect(leads({ input: { formulas: ['t2', 'haigis'] } })).toBe('t2');
    expect(codesOf({ input: { formulas: ['t2', 'haigis'] } })).toEqual([]);
  });
});

describe('a formula is silent', () => {
  it('without constants of the origin of the method, never with those of the other', () => {
    expect(silencedOf({ values: { method: 'immersion' } })).toEqual(everyFormula('no-constants'));
    expect(theModel({ values: { method: 'contact' } }).silenced[0]?.reason).toBe(
      'no ultrasound constants for this lens',
    );
    const ultrasoundOnly = [aLensModel({ constants: constantsFor('ultrasound') })];
    expect(theModel({ lenses: ultrasoundOnly }).silenced[0]?.reason).toBe(
      'no optical constants for this lens',
    );
    expect(silencedOf({ lenses: ultrasoundOnly, values: { method: 'contact' } })).toEqual([]);
  });

  it('takes each constant of the fitting origin', () => {
    const both = [
      aLensModel({ constants: [...constantsFor('ultrasound', 118.5), ...constantsFor('optical', 118.9)] }),
    ];
    const aConstantOf = (method: 'optical' | 'immersion') =>
      theModel({ lenses: both, values: { method } }).constants.find(({ formula }) => formula === 'srkt');

    expect(aConstantOf('optical')).toMatchObject({ origin: 'optical', values: { aConstant: 118.9 } });
    expect(aConstantOf('immersion')).toMatchObject({ origin: 'ultrasound', values: { aConstant: 118.5 } });
  });

  it('when Haigis has no chamber depth, and only Haigis', () => {
    expect(theModel({ values: { acdMm: null, acdFrom: null } }).silenced).toEqual([
      { formula: 'haigis', code: 'no-chamber-depth', reason: 'the anterior chamber depth was not measured' },
    ]);
    expect(theModel({ values: { acdFrom: 'endothelium', cornealThicknessUm: null } }).silenced).toEqual([
      {
        formula: 'haigis',
        code: 'chamber-depth-from-endothelium',
        reason:
          'the chamber depth was taken from the back of the cornea and the corneal thickness is not known',
      },
    ]);
  });

  it('when Haigis is given a depth beyond its limits, and only Haigis', () => {
    expect(theModel({ values: { acdMm: 1.2 } }).silenced).toEqual([
      {
        formula: 'haigis',
        code: 'OutOfRangeError',
        reason: 'anteriorChamberDepthMm is 1.2; it must lie between 1.5 and 6',
      },
    ]);
  });

  it('beyond its hard limits, in the words of the refusal', () => {
    const { silenced, leadingFormula, candidates, exactPowers } = theModel({
      values: { steepRadiusMm: radiusOf(66) },
    });

    expect(silenced.map(({ formula }) => formula)).toEqual([...formulaIds]);
    expect(silenced[0]?.reason).toMatch(
      /^steepRadiusMm is 5\.11\d*; it must lie between 5\.19\d* and 13\.5$/,
    );
    expect([leadingFormula, candidates, exactPowers]).toEqual([null, [], []]);
  });

  it.each([
    [{ cornealSurgery: 'yes' as const }, 'corneal-surgery'],
    [{ vitreousStatus: 'silicone-oil' as const }, 'silicone-oil'],
    [{ vitreousStatus: 'gas' as const }, 'gas'],
    [{ lensStatus: 'pseudophakic' as const }, 'lens-status'],
    [{ lensStatus: 'aphakic' as const }, 'lens-status'],
    [{ lensStatus: 'phakic-lens' as const }, 'lens-status'],
  ])('with every other, after %j', (history, code) => {
    expect(silencedOf({ eye: anEye(history) })).toEqual(everyFormula(code));
    expect(theModel({ eye: anEye(history) }).candidates).toEqual([]);
  });

  it.each([
    { cornealSurgery: null },
    { cornealSurgery: 'unknown' as const },
    { lensStatus: null },
    { vitreousStatus: null },
  ])('but not while an answer is missing: %j is shown and stopped by its flag', (history) => {
    expect(silencedOf({ eye: anEye(history) })).toEqual([]);
  });

  it('throws on when something else than a refusal happens', () => {
    const broken = aLensModel();
    Object.defineProperty(broken.constants[0], 'values', {
      get: () => {
        throw new TypeError('a defect');
      },
    });

    expect(() => calculate({ lenses: [broken] })).toThrow('a defect');
  });
});

describe('the spread', () => {
  const sdOf = (given: Parameters<typeof theModel>[0]) => closestOf(given)?.landing.sdD ?? NaN;
  const lenses = [aLensModel({ constants: [...constantsFor('ultrasound'), ...constantsFor('optical')] })];

  it('is wider for immersion than for optical, and wider for contact than for immersion', () => {
    const [optical, immersion, contact] = (['optical', 'immersion', 'contact'] as const).map((method) =>
      sdOf({ lenses, values: { method } }),
    );

    expect(optical).toBeCloseTo(0.43, 1);
    expect(immersion).toBeCloseTo(0.53, 1);
    expect(contact).toBeCloseTo(0.63, 1);
  });

  it.each([['swollen-lens'], ['thick-lens'], ['between-eyes-method']])(
    'is that of eyes which optics could not read when ultrasound comes with %s',
    (ruleId) => {
      const plain = sdOf({ lenses, values: { method: 'immersion' } });
      const dense = sdOf({ lenses, values: { method: 'immersion' }, raised: [ruleId] });

      expect(dense - plain).toBeGreaterThan(0.15);
      expect(sdOf({ lenses, raised: [ruleId] })).toBe(sdOf({ lenses }));
    },
  );

  it('is that too when nobody knows how thick the lens is', () => {
    expect(sdOf({ lenses, values: { method: 'contact', lensThicknessMm: null } })).toBeGreaterThan(
      sdOf({ lenses, values: { method: 'contact' } }) + 0.1,
    );
  });
});

describe('notices', () => {
  it('say that the target asks for more or less than the model is made in, and show the nearest end', () => {
    const short = [aLensModel({ powerRanges: [{ fromD: 10, toD: 15, stepD: 0.5 }] })];
    const model = theModel({ lenses: short });

    expect(model.notices[0]?.code).toBe('beyond-range');
    expect(model.notices[0]?.message).toMatch(
      /^The target asks for \+2\d\.\d\d D, stronger than the strongest that this model is made in/,
    );
    expect(model.candidates.map(({ powerD }) => powerD)).toEqual([15, 14.5, 14, 13.5]);
    expect(closestOf({ lenses: short })?.powerD).toBe(15);
  });

  it('find the nearest end below too, where every chance is nil', () => {
    const strong = [aLensModel({ powerRanges: [{ fromD: 45, toD: 50, stepD: 1 }] })];

    expect(theModel({ lenses: strong }).notices[0]?.message).toMatch(/weaker than the weakest/);
    expect(closestOf({ lenses: strong })).toMatchObject({ powerD: 45, landing: { chance: 0 } });
  });

  it('mention that formulas differ by more than half a dioptre, and ask to weigh more than one', () => {
    const shifted = (byA: number) => {
      const constants = constantsFor('optical').map((constant) =>
        constant.formula === 't2' ? { ...constant, values: { aConstant: A_CONSTANT + byA } } : constant,
      );
      return codesOf({ lenses: [aLensModel({ constants })], input: { formulas: ['srkt', 't2'] } });
    };

    expect(shifted(0)).toEqual([]);
    expect(shifted(1)).toEqual(['formulas-disagree-note']);
    expect(shifted(2)).toEqual(['formulas-disagree-weigh']);
  });

  it('of a toric model say that cylinder and axis are left out', () => {
    expect(codesOf({ lenses: [aLensModel({ isToric: true, cylinderStepsD: [1] })] })).toEqual([
      'toric-not-planned',
    ]);
  });

  it('of a formula stand beside its prediction', () => {
    const { candidates } = theModel({
      values: { axialLengthMm: 30.5, flatRadiusMm: radiusOf(47), steepRadiusMm: radiusOf(48) },
    });
    const codes = Object.fromEntries(
      (candidates[0]?.predictions ?? []).map(({ formula, notices }) => [
        formula,
        notices.map(({ code }) => code),
      ]),
    ) as Record<FormulaId, string[]>;

    expect(codes.srkt).toEqual(['srkt-negative-radicand']);
    expect(codes.holladay1).toEqual(['holladay1-angle-cap']);
  });
});

describe('a chosen power from which no refraction comes', () => {
  it('has no row, and takes no other row with it', () => {
    const lenses = [aLensModel({ powerRanges: [{ fromD: -20, toD: 60, stepD: 1 }] })];
    const values = { axialLengthMm: 39.9, flatRadiusMm: radiusOf(64), steepRadiusMm: radiusOf(64.9) };
    const { candidates } = theModel({ lenses, values, choice: { lensId: aLensModel().id, powerD: 60 } });

    expect(candidates.length).toBeGreaterThanOrEqual(4);
    expect(candidates.some(({ powerD }) => powerD === 60)).toBe(false);
  });
});

describe('flags of the decisions', () => {
  const flagsOf = (given: Parameters<typeof calculate>[0]) =>
    calculate(given).flags.map(({ ruleId, severity }) => [ruleId, severity]);
  const choose = (powerD: number) => ({ lensId: aLensModel().id, powerD });

  it('follow those of the measurement', () => {
    expect(flagsOf({ raised: ['shallow-chamber'], input: { targetD: 1 } })).toEqual([
      ['shallow-chamber', 'weigh'],
      ['target-unusual', 'weigh'],
    ]);
  });

  it.each([
    [-3.01, true],
    [-3, false],
    [0.25, false],
    [0.26, true],
  ])('weigh an unusual target: %s D %s', (targetD, isRaised) => {
    expect(flagsOf({ input: { targetD } }).some(([ruleId]) => ruleId === 'target-unusual')).toBe(isRaised);
  });

  it.each([
    [5.5, 'The chosen power +5.50 D is unusual'],
    [6, undefined],
    [30, undefined],
    [30.5, 'The chosen power +30.50 D is unusual'],
  ])('weigh an unusual power: %s D', (powerD, message) => {
    const { flags } = calculate({ choice: choose(powerD) });

    expect(flags.find(({ ruleId }) => ruleId === 'power-unusual')?.message).toBe(message);
  });

  it('say of a minus lens that it is one', () => {
    const lenses = [aLensModel({ powerRanges: [{ fromD: -10, toD: 10, stepD: 1 }] })];
    const { flags } = calculate({ lenses, values: { axialLengthMm: 34 }, choice: choose(-5) });

    expect(flags.find(({ ruleId }) => ruleId === 'power-unusual')?.message).toBe(
      'The chosen power −5.00 D is a minus lens',
    );
  });

  it('note a choice that is not the closest, and say which is', () => {
    const closest = closestOf()?.powerD ?? NaN;

    expect(flagsOf({ choice: choose(closest) })).toEqual([]);
    expect(calculate({ choice: choose(closest + 1) }).flags).toMatchObject([
      {
        ruleId: 'not-closest',
        severity: 'note',
        message: expect.stringMatching(
          /^Another power has the better chance of landing: \+\d\d\.\d0 D with 7\d %, the chosen \+\d\d\.\d0 D with \d\d %$/,
        ),
      },
    ]);
  });

  it('weigh formulas that differ by more than one dioptre for the chosen power', () => {
    const constants = constantsFor('optical').map((constant) =>
      constant.formula === 't2' ? { ...constant, values: { aConstant: A_CONSTANT + 2 } } : constant,
    );
    const given = {
      lenses: [aLensModel({ constants })],
      input: { formulas: ['srkt' as const, 't2' as const] },
    };
    const closest = closestOf(given)?.powerD ?? NaN;

    expect(flagsOf({ ...given, choice: choose(closest) })).toEqual([['formulas-disagree', 'weigh']]);
    expect(flagsOf(given)).toEqual([]);
  });

  it('weigh SRK/T or Holladay 1 leading above 26.50 mm without an adjusted length', () => {
    const raised = (axialLengthMm: number, input: object) =>
      flagsOf({
        values: { axialLengthMm },
        input,
        choice: choose(closestOf({ values: { axialLengthMm }, input })?.powerD ?? NaN),
      }).some(([ruleId]) => ruleId === 'long-eye-unadjusted');

    expect(raised(26.51, { leadingFormula: 'srkt' })).toBe(true);
    expect(raised(26.51, { leadingFormula: 'holladay1' })).toBe(true);
    expect(raised(26.5, { leadingFormula: 'srkt' })).toBe(false);
    expect(raised(26.51, { leadingFormula: 'haigis' })).toBe(false);
    expect(raised(26.51, { leadingFormula: 'srkt', axialLengthAdjustment: 'wangKoch2011' })).toBe(false);
  });
});

describe('the axial length', () => {
  it('is adjusted for the formulas when the plan says so', () => {
    const given = { values: { axialLengthMm: 28 }, input: { formulas: ['srkt' as const] } };
    const exact = (axialLengthAdjustment: 'none' | 'wangKoch2011') =>
      theModel({ ...given, input: { ...given.input, axialLengthAdjustment } }).exactPowers[0]?.powerD ?? NaN;

    expect(exact('wangKoch2011')).toBeGreaterThan(exact('none') + 0.3);
    expect(calculate({ ...given, input: { axialLengthAdjustment: 'wangKoch2011' } }).eye.axialLengthMm).toBe(
      28,
    );
  });

  it('stays what it was measured as', () => {
    expect(calculate().eye.axialLengthMm).toBe(PLAIN_VALUES.axialLengthMm);
  });
});
