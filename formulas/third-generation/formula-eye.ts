/**
 * What every formula of this folder receives: lengths already checked, the axial length already adjusted.
 */
import type { CorneaRadii, LensConstants, NegativeRadicandRule } from '../types';
import type { ThinLensEye } from '../optics/thin-lens';

export interface FormulaEye {
  axialLengthMm: number;
  /** The cornea as it is: for the vergence. */
  cornea: CorneaRadii;
  /** The cornea that the lens position is predicted from: the same, unless double-K. */
  elpCornea: CorneaRadii;
  anteriorChamberDepthMm: number | undefined;
  negativeRadicand: NegativeRadicandRule;
}

export type FormulaModel = (eye: FormulaEye, constants: LensConstants) => ThinLensEye;
