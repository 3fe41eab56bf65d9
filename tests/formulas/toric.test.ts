import * as fc from 'fast-check';
import {
  axisDifferenceDeg,
  normaliseAxisDeg,
  planToric,
  powerForRefraction,
  predictRefraction,
} from '@/formulas';
import { anEye, anyAxisDeg, anyFormulaWithConstants, averageConstants } from './support/eyes';
import type { PosteriorCornea, ToricPlan, ToricQuestion } from '@/formulas';

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

const base: ToricQuestion = {
  formula: 'srkt',
  eye: anEye(23.5, 43, 45),
  steepAxisDeg: 90,
  constants: { aConstant: 118.9 },
  siaD: 0,
  incisionAxisDeg: 0,
  posteriorCornea: 'none',
  lens: { powerD: 21, cylinderD: 0, axisDeg: 90 },
};

const anyQuestion: fc.Arbitrary<ToricQuestion> = fc
  .record({
    with: anyFormulaWithConstants,
    geometry: fc.record({
      axialLengthMm: between(21, 28),
      flatD: between(39, 46),
      cylinderD: between(0.25, 4),
    }),
    steepAxisDeg: anyAxisDeg,
    siaD: between(0, 0.8),
    incisionAxisDeg: anyAxisDeg,
    lens: fc.record({ powerD: between(5, 30), cylinderD: between(0, 6), axisDeg: anyAxisDeg }),
  })
  .map(({ with: { formula, constants }, geometry: { axialLengthMm, flatD, cylinderD }, ...rest }) => ({
    ...rest,
    formula,
    constants,
    eye: anEye(axialLengthMm, flatD, flatD + cylinderD),
    posteriorCornea: 'none' as PosteriorCornea,
  }));

/** The residual as a power vector, which has no axis to jump. */
function vectorOf({ residual: { sphereD, cylinderD, axisDeg } }: ToricPlan) {
  const doubleRad = (axisDeg * Math.PI) / 90;
  return {
    meanD: sphereD + cylinderD / 2,
    j0D: (-cylinderD / 2) * Math.cos(doubleRad),
    j45D: (-cylinderD / 2) * Math.sin(doubleRad),
  };
}

/** The eye in a mirror: every axis turns the other way. */
function mirrored(question: ToricQuestion): ToricQuestion {
  return {
    ...question,
    steepAxisDeg: 180 - question.steepAxisDeg,
    incisionAxisDeg: 180 - question.incisionAxisDeg,
    lens: { ...question.lens, axisDeg: 180 - question.lens.axisDeg },
  };
}

/** The same axes written half a turn on; only 0 and 180 can both be written. */
function halfTurned(question: ToricQuestion): ToricQuestion {
  const turn = (axisDeg: number) => (axisDeg === 0 ? 180 : axisDeg === 180 ? 0 : axisDeg);
  return {
    ...question,
    steepAxisDeg: turn(question.steepAxisDeg),
    incisionAxisDeg: turn(question.incisionAxisDeg),
    lens: { ...question.lens, axisDeg: turn(question.lens.axisDeg) },
  };
}

describe('symmetries of the toric plan', () => {
  it('a mirrored eye has the mirrored residual', () => {
    fc.assert(
      fc.property(anyQuestion, (question) => {
        const plan = planToric(question);
        const mirror = planToric(mirrored(question));

        expect(mirror.cornealCylinderD).toBeCloseTo(plan.cornealCylinderD, 10);
        expect(mirror.planeRatio).toBeCloseTo(plan.planeRatio, 8);
        expect(vectorOf(mirror).meanD).toBeCloseTo(vectorOf(plan).meanD, 9);
        expect(vectorOf(mirror).j0D).toBeCloseTo(vectorOf(plan).j0D, 9);
        expect(vectorOf(mirror).j45D).toBeCloseTo(-vectorOf(plan).j45D, 9);
        expect(axisDifferenceDeg(mirror.idealAxisDeg, -plan.idealAxisDeg)).toBeLessThan(1e-5);
      }),
      { numRuns: 300 },
    );
  });

  it('turning the whole eye turns the residual with it and changes nothing else', () => {
    fc.assert(
      fc.property(anyQuestion, between(0, 180), (question, byDeg) => {
        const turn = (axisDeg: number) => normaliseAxisDeg(axisDeg + byDeg);
        const turned = planToric({
          ...question,
          steepAxisDeg: turn(question.steepAxisDeg),
          incisionAxisDeg: turn(question.incisionAxisDeg),
          lens: { ...question.lens, axisDeg: turn(question.lens.axisDeg) },
        });
        const plan = planToric(question);

        expect(turned.residual.sphereD).toBeCloseTo(plan.residual.sphereD, 9);
        expect(turned.residual.cylinderD).toBeCloseTo(plan.residual.cylinderD, 9);
        expect(turned.fullCorrectionCylinderD).toBeCloseTo(plan.fullCorrectionCylinderD, 9);
      }),
      { numRuns: 300 },
    );
  });

  it.each(['none', 'abulafiaKoch2016', 'goggin2015'] as const)(
    '0 and 180 degrees are one axis (%s)',
    (posteriorCornea) => {
      const question = {
        ...base,
        posteriorCornea,
        steepAxisDeg: 0,
        incisionAxisDeg: 180,
        siaD: 0.3,
        lens: { powerD: 21, cylinderD: 1.5, axisDeg: 0 },
      };

      const plan = planToric(question);
      const turned = planToric(halfTurned(question));

      expect(turned.cornealCylinderD).toBeCloseTo(plan.cornealCylinderD, 12);
      expect(vectorOf(turned).meanD).toBeCloseTo(vectorOf(plan).meanD, 12);
      expect(vectorOf(turned).j0D).toBeCloseTo(vectorOf(plan).j0D, 12);
      expect(vectorOf(turned).j45D).toBeCloseTo(vectorOf(plan).j45D, 12);
    },
  );

  it('writes the residual with minus cylinder and an axis from above 0 to 180', () => {
    fc.assert(
      fc.property(anyQuestion, (question) => {
        const { residual, idealAxisDeg, steepAxisDeg } = planToric(question);

        expect(residual.cylinderD).toBeLessThanOrEqual(0);
        for (const axisDeg of [residual.axisDeg, idealAxisDeg, steepAxisDeg]) {
          expect(axisDeg).toBeGreaterThan(0);
          expect(axisDeg).toBeLessThanOrEqual(180);
        }
        for (const value of Object.values(residual)) expect(Object.is(value, -0)).toBe(false);
      }),
    );
  });
});

describe('optics of the toric plan', () => {
  it('a lens of the full cylinder on the ideal axis leaves next to no cylinder', () => {
    fc.assert(
      fc.property(anyQuestion, (question) => {
        const ideal = planToric(question);
        const emmetropicD = powerForRefraction(question.formula, question.eye, 0, question.constants).powerD;
        fc.pre(emmetropicD > -30);

        const { residual } = planToric({
          ...question,
          lens: {
            powerD: emmetropicD,
            cylinderD: ideal.fullCorrectionCylinderD,
            axisDeg: ideal.idealAxisDeg,
          },
        });

        // The spherical equivalent is not quite emmetropia when the cylinder is large.
        expect(residual.cylinderD).toBeGreaterThan(-0.02);
        expect(Math.abs(residual.sphereD)).toBeLessThan(0.12);
      }),
      { numRuns: 300 },
    );
  });

  it('agrees with the spherical prediction when cornea and lens have no cylinder', () => {
    for (const formula of ['srkt', 't2', 'holladay1', 'hofferQ', 'haigis'] as const) {
      const eye = anEye(23.5, 44);
      const constants = averageConstants[formula];

      const { residual, planeRatio, cornealCylinderD } = planToric({ ...base, formula, constants, eye });

      expect(cornealCylinderD).toBe(0);
      expect(residual.cylinderD).toBeCloseTo(0, 10);
      expect(residual.sphereD).toBeCloseTo(predictRefraction(formula, eye, 21, constants).refractionD, 10);
      expect(planeRatio).toBeGreaterThan(1.3);
      expect(planeRatio).toBeLessThan(1.5);
    }
  });

  it('the ratio has no step where the cylinder vanishes', () => {
    const ratioAt = (cylinderD: number) =>
      planToric({ ...base, eye: anEye(23.5, 44 - cylinderD / 2, 44 + cylinderD / 2) }).planeRatio;

    expect(ratioAt(0)).toBeCloseTo(ratioAt(0.01), 5);
    expect(ratioAt(0.99e-4)).toBeCloseTo(ratioAt(1.01e-4), 6);
  });

  it('leaves the refraction of each meridian when lens and cornea are aligned', () => {
    const lens = { powerD: 21, cylinderD: 1, axisDeg: 90 };

    const { residual } = planToric({ ...base, lens });

    // Vertical meridian: K 45, lens weak; horizontal: K 43, lens strong. Position from the mean in both.
    const elpCornea = base.eye;
    const meridian = (keratometryD: number, powerD: number) =>
      predictRefraction('srkt', anEye(23.5, keratometryD), powerD, base.constants, { elpCornea }).refractionD;
    const verticalD = meridian(45, 20.5);
    const horizontalD = meridian(43, 21.5);
    expect(verticalD).toBeLessThan(horizontalD);
    expect(residual.sphereD).toBeCloseTo(horizontalD, 9);
    expect(residual.sphereD + residual.cylinderD).toBeCloseTo(verticalD, 9);
    expect(residual.axisDeg).toBeCloseTo(180, 9); // power of the minus cylinder is vertical
  });

  it('a third of the cylinder stays after a turn of 10 degrees, all of it after 30 (Felipe et al. 2011)', () => {
    const { fullCorrectionCylinderD, idealAxisDeg } = planToric(base);
    const emmetropicD = powerForRefraction('srkt', base.eye, 0, base.constants).powerD;
    const leftAfter = (byDeg: number) =>
      planToric({
        ...base,
        lens: { powerD: emmetropicD, cylinderD: fullCorrectionCylinderD, axisDeg: idealAxisDeg + byDeg },
      }).residual.cylinderD;
    const withoutLens = planToric({
      ...base,
      lens: { powerD: emmetropicD, cylinderD: 0, axisDeg: 0 },
    }).residual;

    expect(leftAfter(10) / withoutLens.cylinderD).toBeCloseTo(2 * Math.sin(Math.PI / 18), 2);
    expect(leftAfter(30) / withoutLens.cylinderD).toBeCloseTo(1, 2);
    expect(leftAfter(-10)).toBeCloseTo(leftAfter(10), 9);
  });
});

describe('the cornea after surgery', () => {
  it('an incision on the steep meridian takes its SIA off, one across adds it', () => {
    const on = planToric({ ...base, siaD: 0.5, incisionAxisDeg: 90 });
    const across = planToric({ ...base, siaD: 0.5, incisionAxisDeg: 180 });

    expect(on.cornealCylinderD).toBeCloseTo(1.5, 12);
    expect(across.cornealCylinderD).toBeCloseTo(2.5, 12);
    expect(on.idealAxisDeg).toBeCloseTo(90, 12);
  });

  it('an incision stronger than the cylinder turns the steep meridian', () => {
    const plan = planToric({ ...base, eye: anEye(23.5, 44, 44.2), siaD: 0.5, incisionAxisDeg: 90 });

    expect(plan.cornealCylinderD).toBeCloseTo(0.3, 10);
    expect(plan.steepAxisDeg).toBeCloseTo(180, 10);
  });

  it.each([
    [90, 0.418],
    [180, 1.434],
  ])('Abulafia-Koch: 1 D at %d degrees becomes %d D', (steepAxisDeg, cylinderD) => {
    const plan = planToric({
      ...base,
      eye: anEye(23.5, 43.5, 44.5),
      steepAxisDeg,
      posteriorCornea: 'abulafiaKoch2016',
    });

    expect(plan.cornealCylinderD).toBeCloseTo(cylinderD, 3);
  });

  it.each([
    [90, 1.5, 0.75, []],
    [60, 1.5, 0.75, []],
    [120, 1.5, 0.75, []],
    [150, 1, 1.41, []],
    [149, 1, 1, ['goggin-not-applied']],
    [180, 2, 1.41, []],
    [30, 1, 1.41, []],
    [45, 1, 1, ['goggin-not-applied']],
    [90, 2.25, 1, ['goggin-not-applied']],
  ])('Goggin: steep at %d, lens cylinder %d D: factor %d', (steepAxisDeg, lensCylinderD, factor, codes) => {
    const plan = planToric({
      ...base,
      eye: anEye(23.5, 43.5, 44.5),
      steepAxisDeg,
      posteriorCornea: 'goggin2015',
      lens: { powerD: 21, cylinderD: lensCylinderD, axisDeg: 90 },
    });

    expect(plan.cornealCylinderD).toBeCloseTo(factor, 12);
    expect(plan.steepAxisDeg).toBeCloseTo(steepAxisDeg, 12);
    expect(plan.notices.map(({ code }) => code)).toEqual(codes);
  });
});
