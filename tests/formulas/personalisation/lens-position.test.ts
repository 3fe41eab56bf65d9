import * as fc from 'fast-check';
import {
  findIdealConstant,
  findLensPlane,
  meanKeratometryD,
  predictRefraction,
  radiusMmFromKeratometryD,
  withPersonalValue,
} from '@/formulas';
import { correctedAxialLengthMm } from '@/formulas/third-generation/srkt';
import { anEye, anyEye, anyFormulaWithConstants, averageConstants, averageEye } from '../support/eyes';

const origin = 'optical' as const;

describe('the ideal constant of an eye', () => {
  it('predicts that eye exactly, in every formula', () => {
    const off = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(
        anyFormulaWithConstants,
        anyEye,
        fc.integer({ min: 10, max: 60 }),
        off,
        (drawn, eye, half, offD) => {
          const { formula, constants } = drawn;
          const powerD = half / 2;
          const achievedD = predictRefraction(formula, eye, powerD, constants).refractionD + offD;
          fc.pre(Math.abs(achievedD) < 15);
          const ideal = findIdealConstant({
            formula,
            published: constants,
            outcome: { eye, powerD, achievedD, origin },
          });
          fc.pre(ideal !== null);
          const found = withPersonalValue(formula, constants, ideal!.value);
          // Beyond the hard limits of constants the door would refuse it.
          fc.pre(Math.abs(ideal!.value - Object.values(constants)[0]!) < 1.2);

          expect(predictRefraction(formula, eye, powerD, found).refractionD).toBeCloseTo(achievedD, 8);
        },
      ),
    );
  });

  it('is the constant in force where the prediction came true', () => {
    for (const formula of ['srkt', 't2', 'holladay1', 'hofferQ', 'haigis'] as const) {
      const published = averageConstants[formula];
      const { refractionD, elpMm } = predictRefraction(formula, averageEye, 21, published);
      const outcome = { eye: averageEye, powerD: 21, achievedD: refractionD, origin };
      const ideal = findIdealConstant({ formula, published, outcome });

      expect(ideal?.value).toBeCloseTo(Object.values(published)[0]!, 9);
      expect(ideal?.lensPlaneMm).toBeCloseTo(formula === 'hofferQ' ? elpMm + 0.05 : elpMm, 9);
    }
  });

  it('of SRK/T is A = (d - H + 3.336 + 68.747)/0.62467', () => {
    const eye = anEye(25.2, 42, 43);
    const outcome = { eye, powerD: 17, achievedD: -0.4, origin };
    const ideal = findIdealConstant({ formula: 'srkt', published: averageConstants.srkt, outcome });
    const r = radiusMmFromKeratometryD(meanKeratometryD(eye));
    const width = -5.41 + 0.58412 * correctedAxialLengthMm(25.2) + 0.098 * (337.5 / r);
    const height = r - Math.sqrt(r * r - (width * width) / 4);

    expect(ideal?.value).toBeCloseTo((ideal!.lensPlaneMm - height + 3.336 + 68.747) / 0.62467, 8);
  });

  it('is deeper for a hyperopic surprise', () => {
    const at = (achievedD: number) =>
      findIdealConstant({
        formula: 'srkt',
        published: averageConstants.srkt,
        outcome: { eye: averageEye, powerD: 21, achievedD, origin },
      })!.lensPlaneMm;

    expect(at(0.3)).toBeGreaterThan(at(0));
    expect(at(0)).toBeGreaterThan(at(-0.3));
  });
});

describe('the back-calculated lens plane', () => {
  const eye = { cornealPowerD: 43, opticalLengthMm: 23.5, powerD: 21, achievedD: 0, vertexMm: 12 };

  it('agrees with the ray through both surfaces', () => {
    const planeMm = findLensPlane(eye)!;
    const atLensD = 1336 / (1336 / 43 - planeMm);

    expect(atLensD + 21).toBeCloseTo(1336 / (23.5 - planeMm), 9);
  });

  it('exists for a minus lens in a long eye', () => {
    const planeMm = findLensPlane({ ...eye, opticalLengthMm: 33, powerD: -4, achievedD: -1 })!;
    const atLensD = 1336 / (1336 / (43 - 1 / 1.012) - planeMm);

    expect(planeMm).toBeGreaterThan(0);
    expect(atLensD - 4).toBeCloseTo(1336 / (33 - planeMm), 9);
  });

  it.each([
    ['a lens without power', { powerD: 0 }],
    ['a refraction that no place of this lens gives', { achievedD: 19 }],
    ['a plus lens in an eye whose cornea alone is too strong', { opticalLengthMm: 36, powerD: 10 }],
    ['no converging power left', { cornealPowerD: 10, achievedD: -15 }],
  ])('does not exist for %s', (_, change) => {
    expect(findLensPlane({ ...eye, ...change })).toBeNull();
    const outcome = { eye: averageEye, powerD: 0, achievedD: 0, origin };
    expect(findIdealConstant({ formula: 'srkt', published: averageConstants.srkt, outcome })).toBeNull();
  });
});
