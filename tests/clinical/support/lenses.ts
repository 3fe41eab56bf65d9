/** Invented lens models with constants for every formula. */
import {
  formulaIds,
  haigisDefaultsFromAConstant,
  pAcdFromAConstant,
  surgeonFactorFromAConstant,
} from '@/formulas';
import type { FormulaId } from '@/formulas';
import type { ConstantOrigin, ConstantValues, Lens, LensConstant } from '@/shared/contract';

export const A_CONSTANT = 118.9;

const valuesFor = (aConstant: number): Record<FormulaId, ConstantValues> => ({
  srkt: { aConstant },
  t2: { aConstant },
  holladay1: { surgeonFactorMm: surgeonFactorFromAConstant(aConstant) },
  hofferQ: { pAcdMm: pAcdFromAConstant(aConstant) },
  haigis: haigisDefaultsFromAConstant(aConstant - 1.2),
});

export const constantsFor = (origin: ConstantOrigin, aConstant = A_CONSTANT): LensConstant[] =>
  formulaIds.map((formula) => ({
    formula,
    origin,
    values: valuesFor(aConstant)[formula],
    source: 'invented for the tests',
    dated: '2025-01-01',
  }));

export const aLensModel = (change: Partial<Lens> = {}): Lens => ({
  id: '00000000-0000-4000-8000-000000000030',
  name: 'Invented One',
  kind: 'monofocal',
  isToric: false,
  design: 'one-piece',
  powerRanges: [{ fromD: 5, toD: 35, stepD: 0.5 }],
  cylinderStepsD: [],
  constants: constantsFor('optical'),
  remarks: '',
  isRetired: false,
  isDemo: false,
  version: 0,
  ...change,
});
