/**
 * Wang-Koch adjustment — an axial length for long eyes, to be used in place of the measured one everywhere.
 *
 * Inputs: axialLengthMm, mm, 14 to 40.
 * Result: mm, with the slope of the line in force, and a notice whenever the choice had an effect or could have none.
 * Outside the valid range: below the threshold the measured length stays. Never lengthens an eye: see below.
 * Source: Wang, Shirayama, Ma, Kohnen, Koch, J Cataract Refract Surg 2011;37:2018-2027 [M]; Wang, Koch, J Cataract
 *   Refract Surg 2018;44:1396-1397 (citation [V], lines [M]).
 * Erratum / variant: the SRK/T line of 2011 lengthens the eye between 25.0 and 25.565 mm [D]; there the measured
 *   length stays and a notice says so. Every other line jumps at its threshold (Haigis -0.22 mm). Thresholds are to be
 *   checked in the papers. Derived for constants optimised on normal eyes: not to be joined with constants
 *   optimised on long ones.
 */
import { InvalidOptionError } from '../errors';
import type { AxialLengthAdjustment, FormulaId, Notice } from '../types';

interface Line {
  /** Acts beyond this measured length. */
  aboveMm: number;
  slope: number;
  interceptMm: number;
}

export interface AdjustedAxialLength {
  axialLengthMm: number;
  /** Change of the adjusted length per mm of measured length. */
  slope: number;
  notice: Notice | undefined;
}

/** Adjusted length = slope * measured + intercept [M]. */
export const wangKochLines: Record<
  Exclude<AxialLengthAdjustment, 'none'>,
  Partial<Record<FormulaId, Line>>
> = {
  wangKoch2011: {
    holladay1: { aboveMm: 25, slope: 0.8289, interceptMm: 4.2663 },
    haigis: { aboveMm: 25, slope: 0.9286, interceptMm: 1.562 },
    srkt: { aboveMm: 25, slope: 0.8544, interceptMm: 3.7222 },
    hofferQ: { aboveMm: 25, slope: 0.853, interceptMm: 3.5794 },
  },
  wangKoch2018: {
    holladay1: { aboveMm: 26.5, slope: 0.817, interceptMm: 4.7013 },
    srkt: { aboveMm: 27, slope: 0.8453, interceptMm: 4.0773 },
  },
};

export function adjustAxialLength(
  formula: FormulaId,
  measuredMm: number,
  adjustment: AxialLengthAdjustment,
): AdjustedAxialLength {
  if (adjustment === 'none') return unadjusted(measuredMm);
  const lines = Object.hasOwn(wangKochLines, adjustment) ? wangKochLines[adjustment] : undefined;
  if (lines === undefined) throw new InvalidOptionError('axialLengthAdjustment', adjustment);
  const line = lines[formula];
  if (line === undefined) return unadjusted(measuredMm, unpublishedNotice(adjustment));
  if (measuredMm <= line.aboveMm) return unadjusted(measuredMm);
  const adjustedMm = line.slope * measuredMm + line.interceptMm;
  if (adjustedMm >= measuredMm) return unadjusted(measuredMm, heldNotice(measuredMm));
  return { axialLengthMm: adjustedMm, slope: line.slope, notice: adjustedNotice(measuredMm, adjustedMm) };
}

function unadjusted(axialLengthMm: number, notice?: Notice): AdjustedAxialLength {
  return { axialLengthMm, slope: 1, notice };
}

function adjustedNotice(measuredMm: number, adjustedMm: number): Notice {
  return {
    code: 'axial-length-adjusted',
    message: `The axial length ${measuredMm.toFixed(2)} mm was taken as ${adjustedMm.toFixed(2)} mm (Wang-Koch).`,
  };
}

function heldNotice(measuredMm: number): Notice {
  return {
    code: 'axial-length-adjustment-held',
    message: `The Wang-Koch line would lengthen this eye; the measured ${measuredMm.toFixed(2)} mm was kept.`,
  };
}

function unpublishedNotice(adjustment: AxialLengthAdjustment): Notice {
  const year = adjustment === 'wangKoch2011' ? 2011 : 2018;
  return {
    code: 'axial-length-adjustment-unpublished',
    message: `Wang and Koch ${year} give no line for this formula: the measured axial length was used.`,
  };
}
