/**
 * The two questions of the trade: which refraction will this lens give, and which lens gives this refraction.
 */
import { checkRange, hardLimits } from '../limits';
import { thinLens } from '../optics/thin-lens';
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
  return prepareRequest({ formula, eye, constants, options });
}

/** Predicted spectacle refraction (spherical equivalent), D. */
export function predictRefraction(
  formula: FormulaId,
  eye: EyeGeometry,
  powerD: number,
  constants: LensConstants,
  options: FormulaOptions = {},
): RefractionResult {
  const prepared = prepareRequest({ formula, eye, constants, options });
  return { refractionD: prepared.refractionAt(powerD), elpMm: prepared.elpMm, notices: prepared.notices };
}

/** Lens power for a target spectacle refraction, D, not rounded to the steps of any lens. */
export function powerForRefraction(
  formula: FormulaId,
  eye: EyeGeometry,
  targetD: number,
  constants: LensConstants,
  options: FormulaOptions = {},
): PowerResult {
  const prepared = prepareRequest({ formula, eye, constants, options });
  return { powerD: prepared.powerAt(targetD), elpMm: prepared.elpMm, notices: prepared.notices };
}
/* eslint-enable max-params */

function prepareRequest(request: FormulaRequest): PreparedEye {
  checkRequest(request);
  const optics = opticsOf(request);
  const lens = thinLens(optics, vertexOf(request));
  return {
    elpMm: finite('elpMm', optics.elpMm),
    notices: optics.notices,
    refractionAt: (powerD) => {
      checkRange('powerD', powerD, hardLimits.powerD);
      return finite('refractionD', lens.refractionAt(powerD));
    },
    powerAt: (targetD) => {
      checkRange('targetD', targetD, hardLimits.targetD);
      return finite('powerD', lens.powerAt(targetD));
    },
  };
}
