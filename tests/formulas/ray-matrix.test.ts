/**
 * A second way to the same number: paraxial ray matrices. A parallel bundle through spectacle lens, air gap, cornea,
 * aqueous, lens and vitreous meets in one point of the retina exactly when the upper left element is zero.
 */
import * as fc from 'fast-check';
import { matrix, multiply } from 'mathjs';
import { predictRefraction, powerForRefraction } from '@/formulas';
import { anyEye, anyFormulaWithConstants, anyPowerD, anyTargetD, anyVertexMm } from './support/eyes';
import type { EyeGeometry, FormulaId } from '@/formulas';
import type { Matrix } from 'mathjs';

const N = 1.336;
const RUNS = 1000;

const surface = (powerD: number): Matrix =>
  matrix([
    [1, 0],
    [-powerD, 1],
  ]);
const gap = (reducedM: number): Matrix =>
  matrix([
    [1, reducedM],
    [0, 1],
  ]);

/** Corneal power, D, and optical length, mm: the table of the formulas, written down a second time. */
function opticsByHand(
  formula: FormulaId,
  eye: EyeGeometry,
): { corneaD: number; lengthMm: number; lag: number } {
  const meanD = (337.5 / eye.flatRadiusMm + 337.5 / eye.steepRadiusMm) / 2;
  const radiusM = 0.3375 / meanD;
  const radiiM = (eye.flatRadiusMm + eye.steepRadiusMm) / 2000;
  switch (formula) {
    case 'srkt':
    case 't2':
      return { corneaD: 0.333 / radiusM, lengthMm: 0.97971 * eye.axialLengthMm + 0.65696, lag: 0 };
    case 'holladay1':
      return { corneaD: 1 / 3 / radiusM, lengthMm: eye.axialLengthMm + 0.2, lag: 0 };
    case 'hofferQ':
      return { corneaD: meanD, lengthMm: eye.axialLengthMm, lag: 0.05 };
    case 'haigis':
      return { corneaD: 0.3315 / radiiM, lengthMm: eye.axialLengthMm, lag: 0 };
  }
}

interface Bench {
  formula: FormulaId;
  eye: EyeGeometry;
  vertexMm: number;
  elpMm: number;
}

/** Height on the retina of a parallel ray that enters at height 1. */
function missOnRetina({ formula, eye, vertexMm, elpMm }: Bench, refractionD: number, powerD: number): number {
  const { corneaD, lengthMm, lag } = opticsByHand(formula, eye);
  const planeMm = elpMm + lag;
  const system = [
    gap((lengthMm - planeMm) / 1000 / N),
    surface(powerD),
    gap(planeMm / 1000 / N),
    surface(corneaD),
    gap(vertexMm / 1000),
    surface(refractionD),
  ].reduce((left, right) => multiply(left, right));
  return system.get([0, 0]) as number;
}

const anyCase = fc.record({
  with: anyFormulaWithConstants,
  eye: anyEye,
  vertexMm: anyVertexMm,
  powerD: anyPowerD,
  targetD: anyTargetD,
});

describe('ray matrices', () => {
  it(`focus the predicted refraction on the retina in ${RUNS} random eyes`, () => {
    fc.assert(
      fc.property(anyCase, ({ with: { formula, constants }, eye, vertexMm, powerD }) => {
        const { refractionD, elpMm } = predictRefraction(formula, eye, powerD, constants, { vertexMm });

        expect(Math.abs(missOnRetina({ formula, eye, vertexMm, elpMm }, refractionD, powerD))).toBeLessThan(
          1e-12,
        );
      }),
      { numRuns: RUNS, seed: 1 },
    );
  });

  it(`focus the power for a target on the retina in ${RUNS} random eyes`, () => {
    fc.assert(
      fc.property(anyCase, ({ with: { formula, constants }, eye, vertexMm, targetD }) => {
        const { powerD, elpMm } = powerForRefraction(formula, eye, targetD, constants, { vertexMm });

        expect(Math.abs(missOnRetina({ formula, eye, vertexMm, elpMm }, targetD, powerD))).toBeLessThan(
          1e-12,
        );
      }),
      { numRuns: RUNS, seed: 2 },
    );
  });

  it('would notice a hundredth of a dioptre', () => {
    const eye = { axialLengthMm: 23.5, flatRadiusMm: 7.7, steepRadiusMm: 7.6 };
    const { refractionD, elpMm } = predictRefraction('srkt', eye, 21, { aConstant: 118.9 });
    const bench: Bench = { formula: 'srkt', eye, vertexMm: 12, elpMm };

    expect(Math.abs(missOnRetina(bench, refractionD + 0.01, 21))).toBeGreaterThan(1e-5);
  });
});
