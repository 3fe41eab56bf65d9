/**
 * The two questions of the trade: which refraction will this lens give, and which lens gives this refraction.
 */
import { checkRange, hardLimits } from '../limits';
import { powerWithRefraction, refractionWithPower, thinLens } from '../optics/thin-lens';
import { finite } from '../units/number';
import { checkRequest, opticsOf, vertexOf } from './request';
import type {
  EyeGeometry,
  FormulaId,
  FormulaOptions,
  LensConstants,
  Notice,
  PowerResult,
  RefractionResult,
} from '../types';
import type { ThinLens } from '../optics/thin-lens';
import type { FormulaRequest } from './request';

/** One eye, one formula, one set of constants: the lens position is predicted once, then asked many times. */
export interface PreparedEye {
  readonly elpMm: number;
  readonly notices: Notice[];
  /** Spectacle refraction with a lens of this power, D. */
  refractionAt(powerD: number): number;
  /** Lens power for a spectacle refraction, D. */
  powerAt(targetD: number): number;
}

// The door's signatures are fixed, five arguments in the order in which the trade says them.
/* eslint-disable max-params */

export function prepareFormula(
  formula: FormulaId,
  eye: EyeGeometry,
  constants: LensConstants,
  options: FormulaOptions = {},
): PreparedEye {
  const { lens, elpMm, notices } = prepare({ formula, eye, constants, options });
  return {
    elpMm,
    notices,
    refractionAt: (powerD) => refractionAt(lens, powerD),
    powerAt: (targetD) => powerAt(lens, targetD),
  };
}

/** Predicted spectacle refraction (spherical equivalent), D. */
export function predictRefraction(
  formula: FormulaId,
  eye: EyeGeometry,
  powerD: number,
  constants: LensConstants,
  options: FormulaOptions = {},
): RefractionResult {
  const { lens, elpMm, notices } = prepare({ formula, eye, constants, options });
  return { refractionD: refractionAt(lens, powerD), elpMm, notices };
}

/** Lens power for a target spectacle refraction, D, not rounded to the steps of any lens. */
export function powerForRefraction(
  formula: FormulaId,
  eye: EyeGeometry,
  targetD: number,
  constants: LensConstants,
  options: FormulaOptions = {},
): PowerResult {
  const { lens, elpMm, notices } = prepare({ formula, eye, constants, options });
  return { powerD: powerAt(lens, targetD), elpMm, notices };
}
/* eslint-enable max-params */

function prepare(request: FormulaRequest): { lens: ThinLens; elpMm: number; notices: Notice[] } {
  checkRequest(request);
  const optics = opticsOf(request);
  return {
    lens: thinLens(optics, vertexOf(request)),
    elpMm: finite('elpMm', optics.elpMm),
    notices: optics.notices,
  };
}

function refractionAt(lens: ThinLens, powerD: number): number {
  checkRange('powerD', powerD, hardLimits.powerD);
  return finite('refractionD', refractionWithPower(lens, powerD));
}

function powerAt(lens: ThinLens, targetD: number): number {
  checkRange('targetD', targetD, hardLimits.targetD);
  return finite('powerD', powerWithRefraction(lens, targetD));
}
