/**
 * Hoffer Q — predicts the anterior chamber depth from axial length, corneal power and the personalised ACD.
 *
 * Inputs: axialLengthMm, mm, 14 to 40; corneal radii, mm, 5.19 to 13.5 (K 25 to 65 D, index 1.3375);
 *   pAcdMm 0.2 to 9.2.
 * Result: the thin-lens eye; elpMm is the predicted ACD, the lens plane lies 0.05 mm behind it.
 * Outside the valid range: throws OutOfRangeError naming the input. Clamps only as published: the axial length for
 *   the ACD lies between 18.5 and 31 mm, with a notice. A predicted ACD outside 2.5 to 6.5 mm gives a notice and is
 *   not clamped: whether the paper limits it there is unsettled.
 * Source: Hoffer, J Cataract Refract Surg 1993;19:700-712; errata 1994;20:677; letters 2007;33:2-3 [M].
 * Erratum / variant: misprints of the sign and placing of the last term and of the degree mode are known; this is
 *   the corrected form. That the clamp acts on the ACD alone and the true axial length on the vergence is a reading
 *   to be confirmed in the paper. A jump of 0.0011 mm at 23 mm is inherent.
 */
import { constantOf } from '../constants/kinds';
import { FROM_MEMORY_CAUTION } from '../facts-types';
import { radFromDeg } from '../units/angle';
import { meanKeratometryD } from '../units/corneal-power';
import type { FormulaFacts } from '../facts-types';
import type { ThinLensEye } from '../optics/thin-lens';
import type { LensConstants, Notice } from '../types';
import type { FormulaEye } from './formula-eye';

const SHORTEST_MM = 18.5;
const LONGEST_MM = 31;
/** Between the predicted ACD and the principal plane of the lens, mm. */
const PLANE_BEHIND_ACD_MM = 0.05;
const USUAL_ACD_MM = { min: 2.5, max: 6.5 };

export function hofferQ(eye: FormulaEye, constants: LensConstants): ThinLensEye {
  const notices: Notice[] = [];
  const acdMm = predictedAcdMm(eye, constantOf(constants, 'pAcdMm'), notices);
  return {
    cornealPowerD: meanKeratometryD(eye.cornea), // K at 1.3375, also in the vergence
    indexRatio: 1,
    opticalLengthMm: eye.axialLengthMm,
    lensPlaneMm: acdMm + PLANE_BEHIND_ACD_MM,
    elpMm: acdMm,
    notices,
  };
}

/** ACD = pACD + 0.3 (A-23.5) + tan(K)^2 + 0.1 M (23.5-A)^2 tan(0.1 (G-A)^2) - 0.99166, angles in degrees. */
function predictedAcdMm(eye: FormulaEye, pAcdMm: number, notices: Notice[]): number {
  const clampedMm = Math.min(Math.max(eye.axialLengthMm, SHORTEST_MM), LONGEST_MM); // A
  if (clampedMm !== eye.axialLengthMm) notices.push(clampNotice(eye.axialLengthMm, clampedMm));
  const isShort = clampedMm <= 23;
  const sign = isShort ? 1 : -1; // M
  const turningMm = isShort ? 28 : 23.5; // G
  const tanK = Math.tan(radFromDeg(meanKeratometryD(eye.elpCornea)));
  const bend = Math.tan(radFromDeg(0.1 * (turningMm - clampedMm) ** 2));
  const acdMm =
    pAcdMm + 0.3 * (clampedMm - 23.5) + tanK * tanK + 0.1 * sign * (23.5 - clampedMm) ** 2 * bend - 0.99166;
  if (acdMm < USUAL_ACD_MM.min || acdMm > USUAL_ACD_MM.max) notices.push(unusualAcdNotice(acdMm));
  return acdMm;
}

function clampNotice(axialLengthMm: number, clampedMm: number): Notice {
  return {
    code: 'hofferQ-axial-length-clamp',
    message: `Hoffer Q places the lens as for ${clampedMm.toFixed(1)} mm in place of ${axialLengthMm.toFixed(2)} mm, as published.`,
  };
}

function unusualAcdNotice(acdMm: number): Notice {
  return {
    code: 'hofferQ-acd-unusual',
    message: `Hoffer Q predicts a lens position of ${acdMm.toFixed(2)} mm, outside 2.5 to 6.5 mm. Whether the paper limits it there is unsettled; it was not limited.`,
  };
}

export const hofferQFacts: FormulaFacts = {
  id: 'hofferQ',
  name: 'Hoffer Q',
  year: 1993,
  equations: [
    {
      text: 'A = AL held between 18.5 and 31 mm; M = +1, G = 28 up to 23 mm, else M = -1, G = 23.5',
      mark: 'M',
    },
    {
      text: 'ACD = pACD + 0.3 (A - 23.5) + tan²(K°) + 0.1 M (23.5 - A)² tan(0.1 (G - A)²°) - 0.99166',
      mark: 'M',
    },
    {
      text: 'P = 1336/(AL - ACD - 0.05) - 1.336/(1.336/(K + R) - (ACD + 0.05)/1000), R = Rx/(1 - 0.012 Rx)',
      mark: 'M',
    },
  ],
  sources: [
    {
      citation: 'Hoffer, J Cataract Refract Surg 1993;19:700-712; errata 1994;20:677; letters 2007;33:2-3',
      mark: 'M',
    },
  ],
  validRange:
    'The axial length for the lens position is held between 18.5 and 31 mm. Jump of 0.0011 mm at 23 mm.',
  notKnown: [
    'The paper and its errata could not be opened: every coefficient is recalled.',
    'Whether the clamp on the axial length also acts on the vergence; here it does not.',
    'Whether the predicted ACD is limited to 2.5 to 6.5 mm; here it is only noticed.',
  ],
  caution: FROM_MEMORY_CAUTION,
};
