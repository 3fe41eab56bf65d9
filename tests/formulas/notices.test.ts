import { formulaIds, predictRefraction, prepareFormula } from '@/formulas';
import { anEye, averageConstants, averageEye } from './support/eyes';
import type { EyeGeometry, FormulaId, FormulaOptions, LensConstants } from '@/formulas';

const codes = (formula: FormulaId, eye: EyeGeometry, options?: FormulaOptions, constants?: LensConstants) =>
  prepareFormula(formula, eye, constants ?? averageConstants[formula], options).notices.map(
    ({ code }) => code,
  );

describe('notices', () => {
  it('an average eye gives none', () => {
    for (const formula of formulaIds) expect(codes(formula, averageEye)).toEqual([]);
  });

  it('SRK/T with a negative radicand names the rule that was used', () => {
    const eye = anEye(31, 47);

    const zero = predictRefraction('srkt', eye, 5, { aConstant: 118.9 });
    const absolute = predictRefraction(
      'srkt',
      eye,
      5,
      { aConstant: 118.9 },
      { srktNegativeRadicand: 'absolute' },
    );

    expect(zero.notices.map(({ code }) => code)).toEqual(['srkt-negative-radicand']);
    expect(zero.notices[0]?.message).toContain('set to zero');
    expect(absolute.notices[0]?.message).toContain('absolute value');
    expect(absolute.refractionD).not.toBeCloseTo(zero.refractionD, 1);
  });

  it('T2 has no radicand to be negative', () => expect(codes('t2', anEye(31, 47))).toEqual([]));

  it('Holladay 1: the cap beyond 25.326 mm', () => {
    expect(codes('holladay1', anEye(25.325, 43))).toEqual([]);
    expect(codes('holladay1', anEye(25.327, 43))).toEqual(['holladay1-angle-cap']);
  });

  it('Holladay 1: the floor above K 48.21', () => {
    expect(codes('holladay1', anEye(23, 48.21))).toEqual([]);
    expect(codes('holladay1', anEye(23, 48.22))).toEqual(['holladay1-radius-floor']);
  });

  it('Hoffer Q: the axial length held between 18.5 and 31 mm, for the lens position alone', () => {
    const elp = (axialLengthMm: number) =>
      prepareFormula('hofferQ', anEye(axialLengthMm, 43), { pAcdMm: 5.49 }).elpMm;

    expect(codes('hofferQ', anEye(18.5, 43))).not.toContain('hofferQ-axial-length-clamp');
    expect(codes('hofferQ', anEye(18.4, 43))).toContain('hofferQ-axial-length-clamp');
    expect(codes('hofferQ', anEye(31.1, 43))).toContain('hofferQ-axial-length-clamp');
    expect(elp(17)).toBe(elp(18.5));
    expect(elp(34)).toBe(elp(31));
    const refraction = (mm: number) =>
      predictRefraction('hofferQ', anEye(mm, 43), 5, { pAcdMm: 5.49 }).refractionD;
    expect(refraction(34)).toBeLessThan(refraction(31) - 3);
  });

  it('Hoffer Q: a lens position outside 2.5 to 6.5 mm is noticed and not limited', () => {
    const deep = prepareFormula('hofferQ', anEye(29, 47), { pAcdMm: 5.8 });

    expect(deep.elpMm).toBeGreaterThan(6.5);
    expect(deep.notices.map(({ code }) => code)).toEqual(['hofferQ-acd-unusual']);
    expect(codes('hofferQ', averageEye, {}, { pAcdMm: 2 })).toEqual(['hofferQ-acd-unusual']);
  });

  it('an adjusted axial length, with both lengths in words', () => {
    const { notices } = prepareFormula('haigis', anEye(28, 43), averageConstants.haigis, {
      axialLengthAdjustment: 'wangKoch2011',
    });

    expect(notices).toEqual([
      {
        code: 'axial-length-adjusted',
        message: 'The axial length 28.00 mm was taken as 27.56 mm (Wang-Koch).',
      },
    ]);
  });

  it.each([
    ['t2', 'wangKoch2011'],
    ['t2', 'wangKoch2018'],
    ['haigis', 'wangKoch2018'],
    ['hofferQ', 'wangKoch2018'],
  ] as const)(
    '%s has no line in %s, says so, and takes the measured length',
    (formula, axialLengthAdjustment) => {
      const eye = anEye(26.6, 43);

      const chosen = predictRefraction(formula, eye, 10, averageConstants[formula], {
        axialLengthAdjustment,
      });

      expect(chosen.notices.map(({ code }) => code)).toEqual(['axial-length-adjustment-unpublished']);
      expect(chosen.refractionD).toBe(
        predictRefraction(formula, eye, 10, averageConstants[formula]).refractionD,
      );
    },
  );

  it('below the threshold the adjustment has no effect and says nothing', () => {
    expect(codes('holladay1', anEye(24, 43), { axialLengthAdjustment: 'wangKoch2011' })).toEqual([]);
  });
});

describe('double-K', () => {
  const post = anEye(25, 38);
  const pre = { flatRadiusMm: 337.5 / 43.75, steepRadiusMm: 337.5 / 43.75 };

  it.each(['srkt', 't2', 'holladay1', 'hofferQ'] as const)(
    '%s places the lens by the cornea before surgery and refracts with the one after',
    (formula) => {
      const constants = averageConstants[formula];

      const double = prepareFormula(formula, post, constants, { elpCornea: pre });
      const asBefore = prepareFormula(formula, { ...post, ...pre }, constants);
      const plain = prepareFormula(formula, post, constants);

      expect(double.elpMm).toBe(asBefore.elpMm);
      expect(double.elpMm).toBeGreaterThan(plain.elpMm);
      // A deeper lens must be stronger: plain keratometry leaves hyperopia after myopic surgery.
      expect(double.powerAt(0)).toBeGreaterThan(plain.powerAt(0) + 0.5);
      expect(double.powerAt(0)).not.toBeCloseTo(asBefore.powerAt(0), 0);
    },
  );

  it('has no effect on Haigis, which says so', () => {
    const constants = averageConstants.haigis;

    const double = prepareFormula('haigis', post, constants, { elpCornea: pre });

    expect(double.powerAt(0)).toBe(prepareFormula('haigis', post, constants).powerAt(0));
    expect(double.notices.map(({ code }) => code)).toEqual(['double-k-not-used']);
  });
});
