/**
 * SRK/T — predicts the lens plane from axial length, corneal height and the A-constant.
 *
 * Inputs: axialLengthMm, mm, 14 to 40; corneal radii, mm, 5.19 to 13.5 (K 25 to 65 D, index 1.3375);
 *   aConstant 110 to 125.
 * Result: the thin-lens eye; elpMm is the lens plane, mm from the cornea.
 * Outside the valid range: throws OutOfRangeError naming the input. Never clamps, but for the published rule on
 *   a negative radicand, which comes back as a notice.
 * Source: Retzlaff, Sanders, Kraff, J Cataract Refract Surg 1990;16:333-340; erratum 1990;16:528; Haigis (wrong
 *   ACDs), J Cataract Refract Surg 1993;19:442-446. P(Ref) and V = 12 [V] in a German doctoral thesis quoting the
 *   paper; LCOR, Cw, H [N]; ACDconst, 3.336, RETHICK, Ref(P) [M].
 * Erratum / variant: 1.716, not 1.715, in LCOR: it alone is continuous at 24.2 mm and reproduces the published
 *   limit 33.12 mm at K 45. -5.41, not -5.40948, in Cw: both circulate, difference below 0.001 D. The negative
 *   radicand has two published remedies that differ by up to about 0.5 D: zero (Rosa et al. 2005) and absolute
 *   (Aramberri, J Cataract Refract Surg 2005;31:255-256).
 */
import { constantOf } from '../constants/kinds';
import { lensPositionFromAConstant } from '../constants/conversions';
import { keratometryDFromRadiusMm, meanKeratometryD, radiusMmFromKeratometryD } from '../units/corneal-power';
import type { FormulaFacts } from '../facts-types';
import type { ThinLensEye } from '../optics/thin-lens';
import type { LensConstants, NegativeRadicandRule, Notice } from '../types';
import type { FormulaEye } from './formula-eye';

/** Corneal index 1.333 over keratometric 1.3375 [V]. */
const INDEX_RATIO = 333 / 337.5;
/** Mean offset of the corneal height from the lens plane, mm [M]. */
const OFFSET_MM = 3.336;

export function srkt(eye: FormulaEye, constants: LensConstants): ThinLensEye {
  const notices: Notice[] = [];
  const heightMm = cornealHeightMm(eye, notices);
  return srktOptics(eye, heightMm + lensPositionFromAConstant(constantOf(constants, 'aConstant')), notices);
}

/** The vergence part, which T2 shares: everything but the corneal height. */
export function srktOptics(eye: FormulaEye, heightPlusConstantMm: number, notices: Notice[]): ThinLensEye {
  const lensPlaneMm = heightPlusConstantMm - OFFSET_MM; // ACD = H + ACDconst - 3.336
  return {
    cornealPowerD: INDEX_RATIO * meanKeratometryD(eye.cornea), // 333/r, r = 337.5/K
    indexRatio: INDEX_RATIO,
    opticalLengthMm: eye.axialLengthMm + 0.65696 - 0.02029 * eye.axialLengthMm, // LOPT = AL + RETHICK
    lensPlaneMm,
    elpMm: lensPlaneMm,
    notices,
  };
}

/** LCOR: the axial length that the corneal width is taken from; bent beyond 24.2 mm, peak at 36.2 mm. */
export function correctedAxialLengthMm(axialLengthMm: number): number {
  if (axialLengthMm <= 24.2) return axialLengthMm;
  return -3.446 + 1.716 * axialLengthMm - 0.0237 * axialLengthMm * axialLengthMm;
}

/** r^2 - Cw^2/4, mm^2: negative where the computed cornea would be wider than its sphere. */
export function cornealHeightRadicand(axialLengthMm: number, meanKD: number): number {
  const radiusMm = radiusMmFromKeratometryD(meanKD);
  const widthMm = -5.41 + 0.58412 * correctedAxialLengthMm(axialLengthMm) + 0.098 * meanKD; // Cw
  return radiusMm * radiusMm - (widthMm * widthMm) / 4;
}

/** H = r - sqrt(r^2 - Cw^2/4): height of the corneal dome. */
function cornealHeightMm(eye: FormulaEye, notices: Notice[]): number {
  const meanKD = meanKeratometryD(eye.elpCornea);
  const radicand = cornealHeightRadicand(eye.axialLengthMm, meanKD);
  const radiusMm = radiusMmFromKeratometryD(meanKD);
  if (radicand >= 0) return radiusMm - Math.sqrt(radicand);
  notices.push(radicandNotice(eye.negativeRadicand, radiusMm));
  return eye.negativeRadicand === 'zero' ? radiusMm : radiusMm - Math.sqrt(-radicand);
}

function radicandNotice(rule: NegativeRadicandRule, radiusMm: number): Notice {
  const steep = keratometryDFromRadiusMm(radiusMm).toFixed(2);
  const remedy =
    rule === 'zero'
      ? 'the square root was set to zero (Rosa et al. 2005), which may leave hyperopia'
      : 'the root of the absolute value was taken (Aramberri 2005)';
  return {
    code: 'srkt-negative-radicand',
    message: `SRK/T has no corneal height for this long eye with K ${steep} D: ${remedy}. The two published remedies differ by up to about 0.5 D.`,
  };
}

export const srktFacts: FormulaFacts = {
  id: 'srkt',
  name: 'SRK/T',
  year: 1990,
  equations: [
    { text: 'r = 337.5/K; LCOR = AL up to 24.2 mm, else -3.446 + 1.716 AL - 0.0237 AL²', mark: 'N' },
    { text: 'Cw = -5.41 + 0.58412 LCOR + 0.098 K; H = r - √(r² - Cw²/4)', mark: 'N' },
    { text: 'ACDconst = 0.62467 A - 68.747; ACD = H + ACDconst - 3.336', mark: 'M' },
    { text: 'LOPT = AL + 0.65696 - 0.02029 AL', mark: 'M' },
    {
      text: 'P = 1000 na [XL - 0.001 R (V XL + LOPT r)] / {(LOPT - ACD) [XD - 0.001 R (V XD + ACD r)]}, XL = na r - 0.333 LOPT, XD = na r - 0.333 ACD, na = 1.336, V = 12',
      mark: 'V',
    },
    { text: 'R(P): the same solved for R', mark: 'M' },
  ],
  sources: [
    {
      citation: 'Retzlaff, Sanders, Kraff, J Cataract Refract Surg 1990;16:333-340; erratum 1990;16:528',
      mark: 'M',
    },
    { citation: 'Haigis, J Cataract Refract Surg 1993;19:442-446 (wrong ACDs)', mark: 'M' },
    {
      citation: 'German doctoral thesis quoting Retzlaff 1990 (on-line copy 2012, p. 21): P(Ref), V = 12',
      mark: 'V',
    },
    {
      citation:
        'Aramberri, J Cataract Refract Surg 2005;31:255-256: no corneal height for K 45 beyond 33.12 mm',
      mark: 'V',
    },
  ],
  validRange:
    'No corneal height (negative radicand) for K 45 beyond 33.12 mm, K 46 beyond 29.9, K 47 beyond 27.9, K 48 beyond 26.3, K 49 beyond 25.0; never for K up to 44.',
  notKnown: [
    'The paper itself could not be opened: A to ACDconst, 3.336, the retinal thickness and R(P) are recalled.',
    'Which remedy for the negative radicand is closer; they differ by up to about 0.5 D.',
    'A worked example with inputs and outputs from the paper.',
  ],
  caution: null,
};
