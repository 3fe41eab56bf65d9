/**
 * Posterior cornea — total corneal astigmatism from the keratometric (anterior) one.
 *
 * Inputs: keratometric astigmatism, D at index 1.3375, steep axis in degrees; cylinder of the lens, D at its plane.
 * Result: total corneal astigmatism in the same keratometric dioptres.
 * Outside the valid range: Goggin is not applied to a lens cylinder above 2 D, with a notice. Never clamps.
 * Source: Abulafia, Koch, Wang et al., J Cataract Refract Surg 2016;42:663-671 [M]; Goggin, J Refract Surg 2015;31 [V].
 * Erratum / variant: a later vector study found a centroid error of +0.39 D uncorrected, -0.18 D after
 *   Abulafia-Koch (over-corrects) and +0.27 D after Goggin [V Langenbucher et al., doi
 *   10.1097/j.jcrs.0000000000001370]. Neither belongs on measured total keratometry. Goggin: with the rule is taken as a
 *   steep axis of 60 to 120, against the rule as up to 30 and from 150; oblique eyes stay as they are [M].
 */
import { InvalidOptionError } from '../errors';
import { astigmatismFromVector, vectorFromAstigmatism } from './astigmatism';
import type { Notice, PosteriorCornea } from '../types';
import type { Astigmatism } from './astigmatism';

export interface TotalAstigmatism {
  astigmatism: Astigmatism;
  notices: Notice[];
}

/** Above this lens cylinder Goggin's factors were not meant to be used, D. */
export const GOGGIN_LARGEST_LENS_CYLINDER_D = 2;

export function withPosteriorCornea(
  anterior: Astigmatism,
  method: PosteriorCornea,
  lensCylinderD: number,
): TotalAstigmatism {
  switch (method) {
    case 'none':
      return { astigmatism: anterior, notices: [] };
    case 'abulafiaKoch2016':
      return { astigmatism: abulafiaKoch(anterior), notices: [] };
    case 'goggin2015':
      return goggin(anterior, lensCylinderD);
    default:
      throw new InvalidOptionError('posteriorCornea', method);
  }
}

/** X' = 0.508 + 0.926 X; Y' = 0.009 + 0.932 Y [M]. */
function abulafiaKoch(anterior: Astigmatism): Astigmatism {
  const { xD, yD } = vectorFromAstigmatism(anterior);
  return astigmatismFromVector({ xD: 0.508 + 0.926 * xD, yD: 0.009 + 0.932 * yD });
}

function goggin(anterior: Astigmatism, lensCylinderD: number): TotalAstigmatism {
  if (lensCylinderD > GOGGIN_LARGEST_LENS_CYLINDER_D) {
    return { astigmatism: anterior, notices: [notApplied('holds for a lens cylinder up to 2 D only')] };
  }
  const factor = gogginFactor(anterior.steepAxisDeg);
  if (factor === undefined) {
    return { astigmatism: anterior, notices: [notApplied('has no factor for oblique astigmatism')] };
  }
  const astigmatism = { ...anterior, cylinderD: anterior.cylinderD * factor };
  return { astigmatism, notices: [] };
}

/** 0.75 with the rule, 1.41 against the rule [V]. */
function gogginFactor(steepAxisDeg: number): number | undefined {
  if (steepAxisDeg >= 60 && steepAxisDeg <= 120) return 0.75;
  if (steepAxisDeg <= 30 || steepAxisDeg >= 150) return 1.41;
  return undefined;
}

function notApplied(reason: string): Notice {
  return {
    code: 'goggin-not-applied',
    message: `The posterior cornea was left out: Goggin's correction ${reason}.`,
  };
}
