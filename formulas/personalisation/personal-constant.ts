/**
 * Which single constant of a formula is personalised, and what it does: it moves the lens plane and nothing else. An
 * A-constant moves it by 0.62467 mm per unit, the others millimetre by millimetre. Haigis' a1 and a2 stay.
 */
import { constantOf } from '../constants/kinds';
import { lensPositionFromAConstant } from '../constants/conversions';
import type { ConstantKey } from '../constants/kinds';
import type { FormulaId, LensConstants } from '../types';

export interface PersonalConstant {
  key: ConstantKey;
  /** Movement of the lens plane per unit of the constant, mm. */
  planePerUnitMm: number;
}

const ofA = {
  key: 'aConstant',
  planePerUnitMm: lensPositionFromAConstant(1) - lensPositionFromAConstant(0),
} as const;

export const personalConstants: Record<FormulaId, PersonalConstant> = {
  srkt: ofA,
  t2: ofA,
  holladay1: { key: 'surgeonFactorMm', planePerUnitMm: 1 },
  hofferQ: { key: 'pAcdMm', planePerUnitMm: 1 },
  haigis: { key: 'a0Mm', planePerUnitMm: 1 },
};

export function personalValue(formula: FormulaId, constants: LensConstants): number {
  return constantOf(constants, personalConstants[formula].key);
}

/** The same constants with another personal one. */
export function withPersonalValue(
  formula: FormulaId,
  constants: LensConstants,
  value: number,
): LensConstants {
  return { ...constants, [personalConstants[formula].key]: value } as LensConstants;
}
