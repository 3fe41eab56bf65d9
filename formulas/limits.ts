/**
 * Hard limits: beyond them a number is a typing or unit error, not an eye. Product decisions, not published.
 * Entry screens are narrower; these only keep nonsense out of the mathematics.
 */
import { OutOfRangeError } from './errors';
import { KERATOMETRIC_MM_D } from './units/corneal-power';
import type { Range } from './errors';

export const hardLimits = {
  axialLengthMm: { min: 14, max: 40 },
  /** One meridian, index 1.3375. */
  keratometryD: { min: 25, max: 65 },
  /** The same limits as radii: 65 D and 25 D. */
  radiusMm: { min: KERATOMETRIC_MM_D / 65, max: KERATOMETRIC_MM_D / 25 },
  anteriorChamberDepthMm: { min: 1.5, max: 6 },
  powerD: { min: -30, max: 60 },
  targetD: { min: -20, max: 20 },
  vertexMm: { min: 0, max: 20 },
  aConstant: { min: 110, max: 125 },
  /** The image of the A-constant's limits under SF = 0.5663 A - 65.60, rounded outwards. */
  surgeonFactorMm: { min: -3.5, max: 6 },
  /** The image of the A-constant's limits under pACD = 0.58357 A - 63.896, rounded outwards. */
  pAcdMm: { min: 0.2, max: 9.2 },
  a0Mm: { min: -10, max: 10 },
  a1: { min: -2, max: 2 },
  a2: { min: -2, max: 2 },
  axisDeg: { min: 0, max: 180 },
  siaD: { min: 0, max: 5 },
  cylinderD: { min: 0, max: 20 },
  toleranceD: { min: 0, max: 20 },
} as const satisfies Record<string, Range>;

/** Throws unless the value is a number within the range, ends included. */
export function checkRange(input: string, value: number, range: Range): void {
  // Written so that NaN and undefined fail too.
  if (!(value >= range.min && value <= range.max)) throw new OutOfRangeError(input, value, range);
}
