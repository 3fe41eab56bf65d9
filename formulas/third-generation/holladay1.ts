/**
 * Holladay 1 — predicts the lens plane from the height of the corneal dome and the surgeon factor.
 *
 * Inputs: axialLengthMm, mm, 14 to 40; corneal radii, mm, 5.19 to 13.5 (K 25 to 65 D, index 1.3375);
 *   surgeonFactorMm -3.5 to 6.
 * Result: the thin-lens eye; elpMm is aACD + SF, mm from the cornea.
 * Outside the valid range: throws OutOfRangeError naming the input. Clamps only as published: the radius for the
 *   dome is at least 7 mm (acts above K 48.21) and its chord at most 13.5 mm (acts beyond 25.326 mm); both come
 *   back as notices.
 * Source: Holladay et al., J Cataract Refract Surg 1988;14:17-24 (existence, surgeon factor and reverse solution [V]
 *   in the abstract; equations [N]: they give three published powers with a surgeon factor of 1.712 to 1.720).
 * Erratum / variant: the vergence takes the true radius, not the floored one.
 */
import { constantOf } from '../constants/kinds';
import { meanKeratometryD, radiusMmFromKeratometryD } from '../units/corneal-power';
import type { FormulaFacts } from '../facts-types';
import type { ThinLensEye } from '../optics/thin-lens';
import type { LensConstants, Notice } from '../types';
import type { FormulaEye } from './formula-eye';

/** Corneal index 4/3 over keratometric 1.3375. */
const INDEX_RATIO = 1000 / 3 / 337.5;
const SMALLEST_DOME_RADIUS_MM = 7;
const LARGEST_DOME_CHORD_MM = 13.5;

export function holladay1(eye: FormulaEye, constants: LensConstants): ThinLensEye {
  const notices: Notice[] = [];
  const elpMm = anatomicDepthMm(eye, notices) + constantOf(constants, 'surgeonFactorMm'); // ELP = aACD + SF
  return {
    cornealPowerD: INDEX_RATIO * meanKeratometryD(eye.cornea), // (1000/3)/R
    indexRatio: INDEX_RATIO,
    opticalLengthMm: eye.axialLengthMm + 0.2, // Alm
    lensPlaneMm: elpMm,
    elpMm,
    notices,
  };
}

/** aACD = 0.56 + Rag - sqrt(Rag^2 - AG^2/4); the radicand is at least 49 - 45.56. */
function anatomicDepthMm(eye: FormulaEye, notices: Notice[]): number {
  const radiusMm = radiusMmFromKeratometryD(meanKeratometryD(eye.elpCornea));
  const chordMm = (12.5 * eye.axialLengthMm) / 23.45;
  if (radiusMm < SMALLEST_DOME_RADIUS_MM) notices.push(radiusFloorNotice(radiusMm));
  if (chordMm > LARGEST_DOME_CHORD_MM) notices.push(chordCapNotice(eye.axialLengthMm));
  const domeRadiusMm = Math.max(radiusMm, SMALLEST_DOME_RADIUS_MM); // Rag
  const domeChordMm = Math.min(chordMm, LARGEST_DOME_CHORD_MM); // AG
  return 0.56 + domeRadiusMm - Math.sqrt(domeRadiusMm * domeRadiusMm - (domeChordMm * domeChordMm) / 4);
}

function radiusFloorNotice(radiusMm: number): Notice {
  return {
    code: 'holladay1-radius-floor',
    message: `Holladay 1 takes 7.00 mm in place of the radius ${radiusMm.toFixed(2)} mm to place the lens, as published.`,
  };
}

function chordCapNotice(axialLengthMm: number): Notice {
  return {
    code: 'holladay1-angle-cap',
    message: `Holladay 1 widens the anterior segment no further beyond 25.33 mm (here ${axialLengthMm.toFixed(2)} mm), as published.`,
  };
}

export const holladay1Facts: FormulaFacts = {
  id: 'holladay1',
  name: 'Holladay 1',
  year: 1988,
  equations: [
    { text: 'R = 337.5/K; Rag = max(R, 7); AG = min(12.5 AL/23.45, 13.5)', mark: 'N' },
    { text: 'aACD = 0.56 + Rag - √(Rag² - AG²/4); ELP = aACD + SF; Alm = AL + 0.200', mark: 'N' },
    {
      text: 'P(R) and R(P) as SRK/T with corneal index 4/3, Alm for LOPT, ELP for ACD and R (not Rag) for r',
      mark: 'N',
    },
  ],
  sources: [
    { citation: 'Holladay et al., J Cataract Refract Surg 1988;14:17-24', mark: 'V' },
    {
      citation: 'Teaching page on double-K: AL 24.5, A 118.9; K 39, 36, 32 give 23.3, 26.6, 30.9 D',
      mark: 'V',
    },
  ],
  validRange:
    'Published clamps: radius for the dome at least 7 mm (K above 48.21), chord at most 13.5 mm (AL beyond 25.326 mm).',
  notKnown: [
    'Only the abstract of the paper was read; the equations are recalled and checked by three published powers.',
    'The surgeon factor behind those three powers is not stated there: 1.712 to 1.720 gives them exactly, 1.733 (from A 118.9) within 0.1 D.',
  ],
  caution: null,
};
