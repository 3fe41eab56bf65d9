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

/** An eye ready to be asked: what depends neither on lens nor on refraction is worked out once. */
export interface ThinLens {
  cornealPowerD: number;
  /** Vergence that must leave the back of the lens: n/(L-d). */
  behindLensD: number;
  /** d/n, m. */
  reducedDepthM: number;
  vertexMm: number;
}

export function thinLens(eye: ThinLensEye, vertexMm: number): ThinLens {
  return {
    cornealPowerD: eye.cornealPowerD,
    behindLensD: AQUEOUS_MM_D / (eye.opticalLengthMm - eye.lensPlaneMm),
    reducedDepthM: eye.lensPlaneMm / AQUEOUS_MM_D,
    vertexMm,
  };
}

/** Spectacle refraction with a lens of this power, D. */
export function refractionWithPower(lens: ThinLens, powerD: number): number {
  const beforeLensD = lens.behindLensD - powerD;
  // v/(1 + t v) is n/(n/v + d) without its false singularity at v = 0.
  const denominator = 1 + lens.reducedDepthM * beforeLensD;
  // A lens so strong that the focus would fall between cornea and lens.
  if (!(denominator > 0)) {
    const poleD = lens.behindLensD + 1 / lens.reducedDepthM;
    throw new OutOfRangeError('powerD', powerD, { min: -Number.MAX_VALUE, max: poleD });
  }
  return spectacleFromCornealD(beforeLensD / denominator - lens.cornealPowerD, lens.vertexMm);
}

/** Lens power for a spectacle refraction, D. */
export function powerWithRefraction(lens: ThinLens, refractionD: number): number {
  const behindCorneaD = lens.cornealPowerD + cornealFromSpectacleD(refractionD, lens.vertexMm);
  const denominator = 1 - lens.reducedDepthM * behindCorneaD;
  if (!(denominator > 0)) {
    const depthMm = lens.reducedDepthM * AQUEOUS_MM_D;
    throw new OutOfRangeError('elpMm', depthMm, { min: 0, max: AQUEOUS_MM_D / behindCorneaD });
  }
  return lens.behindLensD - behindCorneaD / denominator;
}

/** A lens plane in front of the cornea or behind the middle of the eye is no eye: constants and eye do not fit. */
export function checkLensPlane(eye: ThinLensEye): void {
  if (!(eye.lensPlaneMm > 0 && eye.lensPlaneMm < eye.opticalLengthMm / 2)) {
    throw new OutOfRangeError('elpMm', eye.lensPlaneMm, { min: 0, max: eye.opticalLengthMm / 2 });
  }
}
