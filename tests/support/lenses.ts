/** Invented lens models. */
import type { LensInput } from '@/shared/contract';

export const aLens = (change: Partial<LensInput> = {}): LensInput => ({
  name: 'Invented One',
  kind: 'monofocal',
  isToric: false,
  design: 'one-piece',
  powerRanges: [{ fromD: 10, toD: 30, stepD: 0.5 }],
  cylinderStepsD: [],
  constants: [
    {
      formula: 'srkt',
      origin: 'optical',
      values: { aConstant: 118.9 },
      source: 'invented for the tests',
      dated: '2025-01-01',
    },
    {
      formula: 'haigis',
      origin: 'optical',
      values: { a0Mm: 1.3, a1: 0.4, a2: 0.1 },
      source: 'invented for the tests',
      dated: '2025-01-01',
    },
  ],
  remarks: '',
  isRetired: false,
  ...change,
});
