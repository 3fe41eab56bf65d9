/**
 * When a formula gives no result, and why. A wrong number is worse than a missing one.
 */
import type { FormulaId } from '@/formulas';
import { originForMethod } from '@/shared/contract';
import type { EyeHistory, Lens, LensConstant, MeasurementValues, Silenced } from '@/shared/contract';
import type { UsedEye } from './effective-eye';

/** Reasons that silence every plain formula of this eye; undefined when they may speak. */
export function silencedByHistory(history: EyeHistory): Omit<Silenced, 'formula'> | undefined {
  if (history.cornealSurgery === 'yes') {
    return {
      code: 'corneal-surgery',
      reason:
        'this cornea had surgery: plain formulas do not hold there and would leave a refractive surprise',
    };
  }
  if (history.vitreousStatus === 'silicone-oil') {
    return {
      code: 'silicone-oil',
      reason: 'the eye is filled with silicone oil: length and optics are not what the formula assumes',
    };
  }
  if (history.vitreousStatus === 'gas') {
    return { code: 'gas', reason: 'gas in the eye: its length cannot be trusted' };
  }
  if (history.lensStatus !== null && history.lensStatus !== 'phakic') {
    return {
      code: 'lens-status',
      reason: 'the eye does not have its natural lens: these constants and this lens position are not for it',
    };
  }
  return undefined;
}

/** The set of constants for this formula and measurement, or why there is none. */
export function constantFor(
  lens: Lens,
  formula: FormulaId,
  method: MeasurementValues['method'],
): LensConstant | Omit<Silenced, 'formula'> {
  const origin = originForMethod(method);
  const constant = lens.constants.find(
    (candidate) => candidate.formula === formula && candidate.origin === origin,
  );
  return constant ?? { code: 'no-constants', reason: `no ${origin} constants for this lens` };
}

/** What Haigis asks beyond length and cornea. */
export function silencedByDepth(
  formula: FormulaId,
  eye: UsedEye,
  values: MeasurementValues,
): Omit<Silenced, 'formula'> | undefined {
  if (formula !== 'haigis' || eye.anteriorChamberDepthMm !== null) return undefined;
  if (values.acdMm === null)
    return { code: 'no-chamber-depth', reason: 'the anterior chamber depth was not measured' };
  return {
    code: 'chamber-depth-from-endothelium',
    reason: 'the chamber depth was taken from the back of the cornea and the corneal thickness is not known',
  };
}
