import * as fc from 'fast-check';
import { formulaIds, powerForRefraction, predictRefraction } from '@/formulas';
import {
  anEye,
  anyEye,
  anyFormulaWithConstants,
  anyPowerD,
  anyTargetD,
  averageConstants,
} from '../support/eyes';

const step = fc.double({ min: 1e-3, max: 2, noNaN: true });

describe('monotony', () => {
  it('a stronger lens makes the eye more myopic', () => {
    fc.assert(
      fc.property(
        anyFormulaWithConstants,
        anyEye,
        anyPowerD,
        step,
        ({ formula, constants }, eye, powerD, by) => {
          const weaker = predictRefraction(formula, eye, powerD, constants).refractionD;
          const stronger = predictRefraction(formula, eye, powerD + by, constants).refractionD;

          expect(stronger).toBeLessThan(weaker);
        },
      ),
    );
  });

  it('a more hyperopic target needs a weaker lens', () => {
    fc.assert(
      fc.property(
        anyFormulaWithConstants,
        anyEye,
        anyTargetD,
        step,
        ({ formula, constants }, eye, targetD, by) => {
          const lower = powerForRefraction(formula, eye, targetD, constants).powerD;
          const higher = powerForRefraction(formula, eye, targetD + by, constants).powerD;

          expect(higher).toBeLessThan(lower);
        },
      ),
    );
  });

  it('a larger constant needs a stronger lens', () => {
    const larger = {
      srkt: { aConstant: 119 },
      t2: { aConstant: 119 },
      holladay1: { surgeonFactorMm: 1.8 },
      hofferQ: { pAcdMm: 5.6 },
      haigis: { a0Mm: -0.6, a1: 0.34, a2: 0.203 },
    };
    for (const formula of formulaIds) {
      const before = powerForRefraction(formula, anEye(23, 43, 44), 0, averageConstants[formula]);
      const after = powerForRefraction(formula, anEye(23, 43, 44), 0, larger[formula]);

      expect(after.elpMm).toBeGreaterThan(before.elpMm);
      expect(after.powerD).toBeGreaterThan(before.powerD);
    }
  });

  it.each(formulaIds)('a longer eye needs a weaker lens, a steeper cornea too (%s)', (formula) => {
    const powerOf = (axialLengthMm: number, keratometryD: number) =>
      powerForRefraction(formula, anEye(axialLengthMm, keratometryD), 0, averageConstants[formula]).powerD;

    for (let axialLengthMm = 20; axialLengthMm < 28; axialLengthMm += 0.25) {
      for (let keratometryD = 40; keratometryD <= 46; keratometryD += 0.5) {
        const powerD = powerOf(axialLengthMm, keratometryD);

        expect(powerOf(axialLengthMm + 0.25, keratometryD)).toBeLessThan(powerD);
        expect(powerOf(axialLengthMm, keratometryD + 0.5)).toBeLessThan(powerD);
      }
    }
  });
});
