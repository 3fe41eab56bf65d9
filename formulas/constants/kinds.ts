/**
 * Which constants a formula takes. Nothing is converted here: a wrong kind is an error, because a converted
 * constant is a different claim about the lens and must be made by name (see conversions.ts).
 */
import { WrongConstantsError } from '../errors';
import { checkRange, hardLimits } from '../limits';
import type { FormulaId, LensConstants } from '../types';

export type ConstantKey = 'aConstant' | 'surgeonFactorMm' | 'pAcdMm' | 'a0Mm' | 'a1' | 'a2';

export const constantKeys: Record<FormulaId, readonly ConstantKey[]> = {
  srkt: ['aConstant'],
  t2: ['aConstant'],
  holladay1: ['surgeonFactorMm'],
  hofferQ: ['pAcdMm'],
  haigis: ['a0Mm', 'a1', 'a2'],
};

/** Throws unless the constants are of the formula's kind and within their hard limits. */
export function checkConstants(formula: FormulaId, constants: LensConstants): void {
  const keys = constantKeys[formula];
  const given = constants as Partial<Record<ConstantKey, number>>;
  for (const key of keys) {
    const value = given[key];
    if (value === undefined) throw new WrongConstantsError(formula, keys, Object.keys(constants));
    checkRange(key, value, hardLimits[key]);
  }
}

/** One constant by name; the union is narrowed here once instead of in every formula. */
export function constantOf(constants: LensConstants, key: ConstantKey): number {
  return (constants as Record<ConstantKey, number>)[key];
}
