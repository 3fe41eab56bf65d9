import * as fc from 'fast-check';
import {
  cornealFromSpectacleD,
  powerForRefraction,
  predictRefraction,
  spectacleFromCornealD,
} from '@/formulas';
import { anyEye, anyFormulaWithConstants, anyPowerD, anyTargetD, anyVertexMm } from '../support/eyes';

const anyCase = fc.record({
  with: anyFormulaWithConstants,
  eye: anyEye,
  vertexMm: anyVertexMm,
  powerD: anyPowerD,
  targetD: anyTargetD,
  adjustment: fc.constantFrom('none' as const, 'wangKoch2011' as const, 'wangKoch2018' as const),
  radicand: fc.constantFrom('zero' as const, 'absolute' as const),
  elpFlatMm: fc.double({ min: 7.2, max: 8.6, noNaN: true }),
});
type Case = typeof anyCase extends fc.Arbitrary<infer Each> ? Each : never;

const optionsOf = ({ vertexMm, adjustment, radicand, elpFlatMm }: Case) => ({
  vertexMm,
  axialLengthAdjustment: adjustment,
  srktNegativeRadicand: radicand,
  elpCornea: { flatRadiusMm: elpFlatMm, steepRadiusMm: elpFlatMm - 0.15 },
});

describe('round trips', () => {
  it('a target leads to a power that leads back to the target within 1e-9 D', () => {
    fc.assert(
      fc.property(anyCase, (each) => {
        const { formula, constants } = each.with;

        const { powerD } = powerForRefraction(formula, each.eye, each.targetD, constants, optionsOf(each));
        fc.pre(powerD >= -30 && powerD <= 60);
        const { refractionD } = predictRefraction(formula, each.eye, powerD, constants, optionsOf(each));

        expect(Math.abs(refractionD - each.targetD)).toBeLessThan(1e-9);
      }),
      { numRuns: 1000 },
    );
  });

  it('a power leads to a refraction that leads back to the power within 1e-9 D', () => {
    fc.assert(
      fc.property(anyCase, (each) => {
        const { formula, constants } = each.with;

        const { refractionD } = predictRefraction(formula, each.eye, each.powerD, constants, optionsOf(each));
        fc.pre(Math.abs(refractionD) <= 20);
        const { powerD } = powerForRefraction(formula, each.eye, refractionD, constants, optionsOf(each));

        expect(Math.abs(powerD - each.powerD)).toBeLessThan(1e-9);
      }),
      { numRuns: 1000 },
    );
  });

  it('both directions report the same lens position and notices', () => {
    fc.assert(
      fc.property(anyCase, (each) => {
        const { formula, constants } = each.with;

        const forward = predictRefraction(formula, each.eye, each.powerD, constants, optionsOf(each));
        const back = powerForRefraction(formula, each.eye, each.targetD, constants, optionsOf(each));

        expect(back.elpMm).toBe(forward.elpMm);
        expect(back.notices).toEqual(forward.notices);
      }),
    );
  });

  it('spectacle plane to cornea and back', () => {
    fc.assert(
      fc.property(anyTargetD, anyVertexMm, (refractionD, vertexMm) => {
        const back = spectacleFromCornealD(cornealFromSpectacleD(refractionD, vertexMm), vertexMm);

        expect(Math.abs(back - refractionD)).toBeLessThan(1e-12);
      }),
    );
  });
});
