/**
 * Lens constants — one kind from another.
 *
 * Inputs: aConstant; surgeonFactorMm, pAcdMm, mm.
 * Result: a constant of another kind, mm.
 * Outside the valid range: throws OutOfRangeError for constants beyond their hard limits. Never clamps.
 * Source: Retzlaff, Sanders, Kraff, J Cataract Refract Surg 1990;16:333-340 (A to ACDconst [M]); Holladay et al.,
 *   J Cataract Refract Surg 1988;14:17-24 (SF from A and pACD [N]: A 118.5 is ACD 5.26 is SF 1.51, Holladay, J Cataract
 *   Refract Surg 2003;29:176-197 as quoted on a teaching page [V]).
 * Erratum / variant: pACD from A is the two Holladay relations joined [D].
 *
 * A converted constant is a start, not a result: each formula is to be optimised with its own.
 */
import { checkRange, hardLimits } from '../limits';

/** ACDconst = 0.62467 A - 68.747, mm. Without a check: the formulas have checked before. */
export function lensPositionFromAConstant(aConstant: number): number {
  return 0.62467 * aConstant - 68.747;
}

/** SF = 0.5663 A - 65.60, mm. */
export function surgeonFactorFromAConstant(aConstant: number): number {
  checkRange('aConstant', aConstant, hardLimits.aConstant);
  return 0.5663 * aConstant - 65.6;
}

/** SF = 0.9704 pACD - 3.595, mm. */
export function surgeonFactorFromPAcd(pAcdMm: number): number {
  checkRange('pAcdMm', pAcdMm, hardLimits.pAcdMm);
  return 0.9704 * pAcdMm - 3.595;
}

/** pACD = (SF + 3.595)/0.9704, mm. */
export function pAcdFromSurgeonFactor(surgeonFactorMm: number): number {
  checkRange('surgeonFactorMm', surgeonFactorMm, hardLimits.surgeonFactorMm);
  return (surgeonFactorMm + 3.595) / 0.9704;
}

/** pACD = 0.58357 A - 63.896, mm. */
export function pAcdFromAConstant(aConstant: number): number {
  checkRange('aConstant', aConstant, hardLimits.aConstant);
  return 0.58357 * aConstant - 63.896;
}

/** A = (SF + 65.60)/0.5663. */
export function aConstantFromSurgeonFactor(surgeonFactorMm: number): number {
  checkRange('surgeonFactorMm', surgeonFactorMm, hardLimits.surgeonFactorMm);
  return (surgeonFactorMm + 65.6) / 0.5663;
}

/**
 * Haigis' default triple from an A-constant: a1 = 0.4, a2 = 0.1, a0 = ACDconst - 0.4 * 3.37 - 0.1 * 23.39.
 * It belongs to ULTRASOUND axial lengths; with optical ones it gives about 0.9 D more lens power than the other
 * formulas at the average eye [D].
 */
export function haigisDefaultsFromAConstant(aConstant: number): { a0Mm: number; a1: number; a2: number } {
  checkRange('aConstant', aConstant, hardLimits.aConstant);
  return { a0Mm: lensPositionFromAConstant(aConstant) - 0.4 * 3.37 - 0.1 * 23.39, a1: 0.4, a2: 0.1 };
}
