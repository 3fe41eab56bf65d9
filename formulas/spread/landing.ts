/**
 * Landing — where the refraction is predicted to fall: mean, standard deviation and the chance of a tolerance.
 *
 * Inputs: formula, eye and constants as for the formula; powerD; a spread whose parts have SDs in their own units.
 * Result: D; parts in D, each one the change of refraction by one SD of its input; chance 0 to 1.
 * Outside the valid range: throws OutOfRangeError naming the input, also for a negative SD. Never clamps.
 * Source: propagation of independent errors [D]; Norrby, J Cataract Refract Surg 2008;34:368-376 [V abstract].
 * Erratum / variant: the derivative is the secant over minus to plus one SD, so that a small jump of a formula at
 *   a branch does not look like a steep slope. The jump of the axial-length adjustment at its threshold is a matter of
 *   choice, not of measurement: the line in force at the measured length is kept.
 */
import { adjustAxialLength } from '../axial-length/wang-koch';
import { checkRange, hardLimits } from '../limits';
import { refractionWithPower, thinLens } from '../optics/thin-lens';
import { checkRequest, opticsOf, vertexOf } from '../predict/request';
import { shiftedCornea } from '../units/corneal-power';
import { finite } from '../units/number';
import { labelToleranceSdD } from './iso-tolerance';
import { normalCdf } from './normal';
import type { ThinLens, ThinLensEye } from '../optics/thin-lens';
import type { FormulaRequest } from '../predict/request';
import type { EyeGeometry, FormulaId, FormulaOptions, LensConstants, Notice } from '../types';
import type { Spread, SpreadPart } from './spread';

export interface LandingPart {
  source: string;
  sdD: number;
}

export interface Landing {
  meanD: number;
  sdD: number;
  /** Probability that the refraction falls within the tolerance of the target, ends included. */
  chanceWithin(targetD: number, toleranceD: number): number;
  /** In the order of the spread; sdD is the root of the sum of their squares. */
  parts: LandingPart[];
  notices: Notice[];
}

export interface LandingEye {
  formula: FormulaId;
  eye: EyeGeometry;
  constants: LensConstants;
  spread: Spread;
  options?: FormulaOptions;
}

/** One eye for many powers: the shifted eyes are worked out once. */
export interface PreparedLanding {
  at(powerD: number): Landing;
}

export function landing(question: LandingEye & { powerD: number }): Landing {
  return prepareLanding(question).at(question.powerD);
}

export function prepareLanding(question: LandingEye): PreparedLanding {
  const request = { ...question, options: question.options ?? {} };
  checkRequest(request);
  const vertexMm = vertexOf(request);
  const measured = opticsOf(request);
  const lens = thinLens(measured, vertexMm);
  const scale = question.spread.scale ?? 1;
  checkRange('spread.scale', scale, SCALE_RANGE);
  const parts = question.spread.parts.map((part) => ({
    source: part.source,
    sdAt: partSd({ request, measured, lens, vertexMm }, part),
  }));
  return {
    at: (powerD) => {
      checkRange('powerD', powerD, hardLimits.powerD);
      const meanD = finite('refractionD', refractionWithPower(lens, powerD));
      return landingOf(
        meanD,
        parts.map(({ source, sdAt }) => ({ source, sdD: finite('sdD', scale * sdAt(powerD)) })),
        measured.notices,
      );
    },
  };
}

function landingOf(meanD: number, parts: LandingPart[], notices: Notice[]): Landing {
  const sdD = Math.hypot(...parts.map((part) => part.sdD));
  return {
    meanD,
    sdD,
    parts,
    notices: [...notices],
    chanceWithin: (targetD, toleranceD) => {
      checkRange('targetD', targetD, hardLimits.targetD);
      checkRange('toleranceD', toleranceD, hardLimits.toleranceD);
      return chanceBetween({ meanD, sdD }, targetD - toleranceD, targetD + toleranceD);
    },
  };
}

function chanceBetween({ meanD, sdD }: { meanD: number; sdD: number }, fromD: number, toD: number): number {
  if (sdD === 0) return meanD >= fromD && meanD <= toD ? 1 : 0;
  const chance = normalCdf((toD - meanD) / sdD) - normalCdf((fromD - meanD) / sdD);
  // Two probabilities near 1 may differ by minus one unit in the last place.
  return Math.max(0, chance);
}

interface Propagation {
  request: FormulaRequest;
  measured: ThinLensEye;
  lens: ThinLens;
  vertexMm: number;
}

/** The part's SD in refraction, as a function of lens power. */
function partSd(propagation: Propagation, part: SpreadPart): (powerD: number) => number {
  if (part.sd === 'isoTolerance')
    return (powerD) => powerSdD(propagation.lens, powerD, labelToleranceSdD(powerD));
  const sd = part.sd;
  checkRange(`spread: ${part.source}`, sd, SD_RANGE);
  if (part.input === 'refractionD') return () => sd;
  if (part.input === 'lensPowerD') return (powerD) => powerSdD(propagation.lens, powerD, sd);
  const lower = thinLens(shiftedOptics(propagation, part, -sd), propagation.vertexMm);
  const upper = thinLens(shiftedOptics(propagation, part, sd), propagation.vertexMm);
  return (powerD) => Math.abs(refractionWithPower(upper, powerD) - refractionWithPower(lower, powerD)) / 2;
}

const SD_RANGE = { min: 0, max: 10 };
const SCALE_RANGE = { min: 0.1, max: 10 };

function powerSdD(lens: ThinLens, powerD: number, sdD: number): number {
  return Math.abs(refractionWithPower(lens, powerD - sdD) - refractionWithPower(lens, powerD + sdD)) / 2;
}

/** The formula's eye with one measurement shifted. Shifted values may pass a hard limit; the measured ones do not. */
function shiftedOptics({ request, measured }: Propagation, part: SpreadPart, by: number): ThinLensEye {
  const { eye } = request;
  switch (part.input) {
    case 'axialLengthMm':
      return opticsOf(shiftedAxialLength(request, by));
    case 'keratometryD':
      return opticsOf({ ...request, eye: { ...eye, ...shiftedCornea(eye, by) } });
    case 'anteriorChamberDepthMm':
      if (eye.anteriorChamberDepthMm === undefined) return measured;
      return opticsOf({
        ...request,
        eye: { ...eye, anteriorChamberDepthMm: eye.anteriorChamberDepthMm + by },
      });
    default:
      return { ...measured, lensPlaneMm: measured.lensPlaneMm + by };
  }
}

/** Keeps the adjustment's line in force at the measured length: its slope, without its jump. */
function shiftedAxialLength(request: FormulaRequest, byMm: number): FormulaRequest {
  const { formula, eye, options } = request;
  const adjusted = adjustAxialLength(formula, eye.axialLengthMm, options.axialLengthAdjustment ?? 'none');
  return {
    ...request,
    eye: { ...eye, axialLengthMm: adjusted.axialLengthMm + adjusted.slope * byMm },
    options: { ...options, axialLengthAdjustment: 'none' },
  };
}
