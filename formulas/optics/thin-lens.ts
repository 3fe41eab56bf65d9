/**
 * Thin-lens eye — refraction from lens power and lens power from refraction, for every formula of this folder.
 *
 * Inputs: corneal power in D (each formula's own index), optical length and lens plane in mm from the cornea.
 * Result: D at the spectacle plane, or D of lens power at the lens plane.
 * Outside the valid range: throws OutOfRangeError where a denominator changes sign. Never clamps.
 * Source: derived from the published closed forms, which are all algebraically this core [D]; an independent
 *   ray-matrix computation stands in the tests.
 * Erratum / variant: index 1.336 for aqueous and vitreous in all formulas; 1.332, sometimes substituted, is a
 *   corneal index and is used by none of them [M].
 *
 *   P  = n/(L-d) - n/(n/(Kc+Rc) - d)          Rc = R/(1 - 0.001 V R)
 *   Rc = n/( n/(n/(L-d) - P) + d ) - Kc       R  = Rc/(1 + 0.001 V Rc)
 */
import { OutOfRangeError } from '../errors';
import { cornealFromSpectacleD, spectacleFromCornealD } from '../units/vertex';
import type { Notice } from '../types';

/** Aqueous and vitreous, in D mm. */
export const AQUEOUS_MM_D = 1336;

/** What a formula makes of an eye: everything the vergence part needs. */
export interface ThinLensEye {
  cornealPowerD: number;
  /** Dioptres of this formula's corneal power per keratometric dioptre. */
  indexRatio: number;
  opticalLengthMm: number;
  lensPlaneMm: number;
  /** The lens position as the formula's paper reports it. */
  elpMm: number;
  notices: Notice[];
}

/** Spectacle refraction with a lens of this power, D. */
export function refractionWithLensD(eye: ThinLensEye, powerD: number, vertexMm: number): number {
  const behindCorneaD = vergenceBehindCorneaD(eye, powerD);
  return spectacleFromCornealD(behindCorneaD - eye.cornealPowerD, vertexMm);
}

/** Lens power for a spectacle refraction, D. */
export function powerForRefractionD(eye: ThinLensEye, refractionD: number, vertexMm: number): number {
  const behindCorneaD = eye.cornealPowerD + cornealFromSpectacleD(refractionD, vertexMm);
  const denominator = 1 - (eye.lensPlaneMm / AQUEOUS_MM_D) * behindCorneaD;
  if (!(denominator > 0)) {
    throw new OutOfRangeError('elpMm', eye.lensPlaneMm, { min: 0, max: AQUEOUS_MM_D / behindCorneaD });
  }
  return AQUEOUS_MM_D / (eye.opticalLengthMm - eye.lensPlaneMm) - behindCorneaD / denominator;
}

/** Vergence that must leave the back of the cornea so that light focuses on the retina. */
function vergenceBehindCorneaD(eye: ThinLensEye, powerD: number): number {
  const beforeLensD = AQUEOUS_MM_D / (eye.opticalLengthMm - eye.lensPlaneMm) - powerD;
  // Same as n/(n/z + d), without its false singularity at z = 0.
  const denominator = 1 + (eye.lensPlaneMm / AQUEOUS_MM_D) * beforeLensD;
  if (!(denominator > 0)) {
    const poleD = AQUEOUS_MM_D / (eye.opticalLengthMm - eye.lensPlaneMm) + AQUEOUS_MM_D / eye.lensPlaneMm;
    throw new OutOfRangeError('powerD', powerD, { min: -Number.MAX_VALUE, max: poleD });
  }
  return beforeLensD / denominator;
}

/** A lens plane in front of the cornea or behind the middle of the eye is no eye: constants and eye do not fit. */
export function checkLensPlane(eye: ThinLensEye): void {
  if (!(eye.lensPlaneMm > 0 && eye.lensPlaneMm < eye.opticalLengthMm / 2)) {
    throw new OutOfRangeError('elpMm', eye.lensPlaneMm, { min: 0, max: eye.opticalLengthMm / 2 });
  }
}
