/**
 * Eyes and constants for the tests of the numerical core. Invented, within what is seen in a practice.
 */
import * as fc from 'fast-check';
import { radiusMmFromKeratometryD } from '@/formulas';
import type { EyeGeometry, FormulaId, LensConstants } from '@/formulas';

export const averageConstants: Record<FormulaId, LensConstants> = {
  srkt: { aConstant: 118.9 },
  t2: { aConstant: 118.9 },
  holladay1: { surgeonFactorMm: 1.733 },
  hofferQ: { pAcdMm: 5.49 },
  haigis: { a0Mm: -0.73, a1: 0.34, a2: 0.203 },
};

/** An eye by its two keratometric powers, as the trade writes it. */
export function anEye(axialLengthMm: number, flatD: number, steepD = flatD): Required<EyeGeometry> {
  return {
    axialLengthMm,
    flatRadiusMm: radiusMmFromKeratometryD(flatD),
    steepRadiusMm: radiusMmFromKeratometryD(steepD),
    anteriorChamberDepthMm: 3.1,
  };
}

/** AL 23.49 mm, K 44.26 D, ACD 3.10 mm: population means. */
export const averageEye = anEye(23.49, 44.26);

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** From short and flat to long and steep, with up to 4 D of astigmatism. */
export const anyEye = fc
  .record({
    axialLengthMm: between(19, 33),
    flatD: between(36, 50),
    cylinderD: between(0, 4),
    anteriorChamberDepthMm: between(2, 5),
  })
  .map(({ axialLengthMm, flatD, cylinderD, anteriorChamberDepthMm }) => ({
    ...anEye(axialLengthMm, flatD, flatD + cylinderD),
    anteriorChamberDepthMm,
  }));

export const anyPowerD = between(-10, 40);
export const anyTargetD = between(-6, 3);
export const anyVertexMm = between(0, 16);
export const anyAxisDeg = between(0, 180);
export const anyFormula = fc.constantFrom<FormulaId>('srkt', 't2', 'holladay1', 'hofferQ', 'haigis');

const anyConstantsOf: Record<FormulaId, fc.Arbitrary<LensConstants>> = {
  srkt: fc.record({ aConstant: between(116, 120.5) }),
  t2: fc.record({ aConstant: between(116, 120.5) }),
  holladay1: fc.record({ surgeonFactorMm: between(0.1, 2.7) }),
  hofferQ: fc.record({ pAcdMm: between(3.8, 6.5) }),
  haigis: fc.record({ a0Mm: between(-1.2, 1.4), a1: between(0.1, 0.45), a2: between(0.08, 0.21) }),
};

/** A formula with constants of its kind. */
export const anyFormulaWithConstants = anyFormula.chain((formula) =>
  anyConstantsOf[formula].map((constants) => ({ formula, constants })),
);
