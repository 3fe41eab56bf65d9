import {
  aConstantFromSurgeonFactor,
  pAcdFromAConstant,
  pAcdFromSurgeonFactor,
  powerForRefraction,
  surgeonFactorFromAConstant,
  surgeonFactorFromPAcd,
} from '@/formulas';
import { cornealHeightRadicand } from '@/formulas/third-generation/srkt';
import { anEye } from '../support/eyes';
import {
  aramberriLimit,
  HOLLADAY_DERIVED_FACTOR_MM,
  HOLLADAY_FITTED_FACTOR_MM,
  holladayConstants,
  holladayPowers,
} from './published-values';

describe('SRK/T against Aramberri 2005', () => {
  it('loses its corneal height at K 45 beyond 33.12 mm and not before', () => {
    const { axialLengthMm, keratometryD } = aramberriLimit;

    expect(cornealHeightRadicand(axialLengthMm, keratometryD)).toBeGreaterThan(0);
    expect(cornealHeightRadicand(axialLengthMm + 0.01, keratometryD)).toBeLessThan(0);
  });

  it('would lose it at 33.36 mm with 1.715 in place of 1.716, so 1.715 is not the published coefficient', () => {
    const radicandWith1715 = (axialLengthMm: number) => {
      const bentMm = -3.446 + 1.715 * axialLengthMm - 0.0237 * axialLengthMm ** 2;
      return (337.5 / 45) ** 2 - (-5.41 + 0.58412 * bentMm + 0.098 * 45) ** 2 / 4;
    };

    expect(radicandWith1715(33.35)).toBeGreaterThan(0);
    expect(radicandWith1715(33.37)).toBeLessThan(0);
  });

  it.each([
    [46, 29.9],
    [47, 27.9],
    [48, 26.3],
    [49, 25.0],
  ])('loses it at K %d beyond %d mm', (keratometryD, axialLengthMm) => {
    expect(cornealHeightRadicand(axialLengthMm - 0.06, keratometryD)).toBeGreaterThan(0);
    expect(cornealHeightRadicand(axialLengthMm + 0.06, keratometryD)).toBeLessThan(0);
  });

  it('never loses it up to K 44', () => {
    for (let axialLengthMm = 14; axialLengthMm <= 40; axialLengthMm += 0.1) {
      expect(cornealHeightRadicand(axialLengthMm, 44)).toBeGreaterThan(0);
    }
  });
});

describe('constants against Holladay 2003', () => {
  const { aConstant, pAcdMm, surgeonFactorMm } = holladayConstants;

  it('takes A 118.5 as SF 1.51 and as pACD 5.26', () => {
    expect(Math.abs(surgeonFactorFromAConstant(aConstant) - surgeonFactorMm)).toBeLessThan(0.005);
    expect(Math.abs(pAcdFromAConstant(aConstant) - pAcdMm)).toBeLessThan(0.005);
    expect(Math.abs(surgeonFactorFromPAcd(pAcdMm) - surgeonFactorMm)).toBeLessThan(0.005);
  });

  it('goes back from SF to pACD and A', () => {
    expect(pAcdFromSurgeonFactor(surgeonFactorFromPAcd(5.26))).toBeCloseTo(5.26, 12);
    expect(aConstantFromSurgeonFactor(surgeonFactorFromAConstant(118.5))).toBeCloseTo(118.5, 12);
  });
});

describe('Holladay 1 against a teaching page on double-K', () => {
  it.each(holladayPowers)('gives $powerD D at K $keratometryD', ({ keratometryD, powerD }) => {
    const constants = { surgeonFactorMm: HOLLADAY_FITTED_FACTOR_MM };

    const result = powerForRefraction('holladay1', anEye(24.5, keratometryD), 0, constants);

    expect(Math.abs(result.powerD - powerD)).toBeLessThan(0.05);
  });

  it.each(holladayPowers)(
    'gives $withDerivedFactorD D at K $keratometryD with the factor from A 118.9',
    ({ keratometryD, withDerivedFactorD }) => {
      const constants = { surgeonFactorMm: surgeonFactorFromAConstant(118.9) };

      const result = powerForRefraction('holladay1', anEye(24.5, keratometryD), 0, constants);

      expect(constants.surgeonFactorMm).toBeCloseTo(HOLLADAY_DERIVED_FACTOR_MM, 5);
      expect(Math.abs(result.powerD - withDerivedFactorD)).toBeLessThan(0.005);
    },
  );
});
