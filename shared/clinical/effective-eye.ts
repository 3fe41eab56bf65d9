/**
 * What the formulas receive from a measurement: radii as stored, chamber depth counted from the epithelium.
 */
import { keratometricCylinderD, meanKeratometryD } from '@/formulas';
import type { EyeGeometry, FormulaId } from '@/formulas';
import type { MeasurementValues, PlanCalculation } from '@/shared/contract';

export type UsedEye = PlanCalculation['eye'];

/** Depth from the epithelium in mm; null when it was not measured or cannot be counted from there. */
export function chamberDepthMm({
  acdMm,
  acdFrom,
  cornealThicknessUm,
}: Pick<MeasurementValues, 'acdMm' | 'acdFrom' | 'cornealThicknessUm'>): number | null {
  if (acdMm === null || acdFrom === null) return null;
  if (acdFrom === 'epithelium') return acdMm;
  return cornealThicknessUm === null ? null : acdMm + cornealThicknessUm / 1000;
}

/** Steep axis 1–180; from the flat one when only that was given. */
export function steepAxisDeg({
  flatAxisDeg,
  steepAxisDeg: steep,
}: Pick<MeasurementValues, 'flatAxisDeg' | 'steepAxisDeg'>): number | null {
  if (steep !== null) return steep;
  if (flatAxisDeg === null) return null;
  return flatAxisDeg > 90 ? flatAxisDeg - 90 : flatAxisDeg + 90;
}

export function usedEye(values: MeasurementValues): UsedEye {
  const cornea = { flatRadiusMm: values.flatRadiusMm, steepRadiusMm: values.steepRadiusMm };
  return {
    axialLengthMm: values.axialLengthMm,
    ...cornea,
    meanKeratometryD: meanKeratometryD(cornea),
    cornealCylinderD: keratometricCylinderD(cornea),
    steepAxisDeg: steepAxisDeg(values),
    anteriorChamberDepthMm: chamberDepthMm(values),
    method: values.method,
  };
}

/** What one formula asks: the chamber depth only where it is used, so that an odd depth silences no other formula. */
export function geometryFor(formula: FormulaId, eye: UsedEye): EyeGeometry {
  const { axialLengthMm, flatRadiusMm, steepRadiusMm, anteriorChamberDepthMm } = eye;
  const usesDepth = formula === 'haigis' && anteriorChamberDepthMm !== null;
  return {
    axialLengthMm,
    flatRadiusMm,
    steepRadiusMm,
    ...(usesDepth ? { anteriorChamberDepthMm } : {}),
  };
}
