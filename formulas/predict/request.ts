/**
 * A question to a formula: checked once, then turned into optics as often as needed (the spread of a landing
 * asks the same question again with shifted measurements, which may step over a hard limit by a hair).
 */
import { adjustAxialLength } from '../axial-length/wang-koch';
import { checkConstants } from '../constants/kinds';
import { InvalidOptionError } from '../errors';
import { checkRange, hardLimits } from '../limits';
import { checkLensPlane } from '../optics/thin-lens';
import { haigis } from '../third-generation/haigis';
import { hofferQ } from '../third-generation/hoffer-q';
import { holladay1 } from '../third-generation/holladay1';
import { srkt } from '../third-generation/srkt';
import { t2 } from '../third-generation/t2';
import { DEFAULT_VERTEX_MM } from '../units/vertex';
import type { ThinLensEye } from '../optics/thin-lens';
import type { FormulaModel } from '../third-generation/formula-eye';
import type { EyeGeometry, FormulaId, FormulaOptions, LensConstants } from '../types';

export interface FormulaRequest {
  formula: FormulaId;
  eye: EyeGeometry;
  constants: LensConstants;
  options: FormulaOptions;
}

const models: Record<FormulaId, FormulaModel> = { srkt, t2, holladay1, hofferQ, haigis };

/** Throws where an input is impossible, missing or of the wrong kind. */
export function checkRequest(request: FormulaRequest): void {
  const { formula, eye, constants, options } = request;
  if (!Object.hasOwn(models, formula)) throw new InvalidOptionError('formula', formula);
  checkRange('axialLengthMm', eye.axialLengthMm, hardLimits.axialLengthMm);
  checkRange('flatRadiusMm', eye.flatRadiusMm, hardLimits.radiusMm);
  checkRange('steepRadiusMm', eye.steepRadiusMm, hardLimits.radiusMm);
  if (eye.anteriorChamberDepthMm !== undefined) {
    checkRange('anteriorChamberDepthMm', eye.anteriorChamberDepthMm, hardLimits.anteriorChamberDepthMm);
  }
  checkConstants(formula, constants);
  checkOptions(options);
}

function checkOptions(options: FormulaOptions): void {
  if (options.vertexMm !== undefined) checkRange('vertexMm', options.vertexMm, hardLimits.vertexMm);
  if (options.elpCornea !== undefined) {
    checkRange('elpCornea.flatRadiusMm', options.elpCornea.flatRadiusMm, hardLimits.radiusMm);
    checkRange('elpCornea.steepRadiusMm', options.elpCornea.steepRadiusMm, hardLimits.radiusMm);
  }
  const rule = options.srktNegativeRadicand;
  if (rule !== undefined && rule !== 'zero' && rule !== 'absolute') {
    throw new InvalidOptionError('srktNegativeRadicand', rule);
  }
}

export function vertexOf(request: Pick<FormulaRequest, 'options'>): number {
  return request.options.vertexMm ?? DEFAULT_VERTEX_MM;
}

/** The formula's thin-lens eye with all notices. */
export function opticsOf(request: FormulaRequest): ThinLensEye {
  const { formula, eye, constants, options } = request;
  const adjusted = adjustAxialLength(formula, eye.axialLengthMm, options.axialLengthAdjustment ?? 'none');
  const optics = models[formula](
    {
      axialLengthMm: adjusted.axialLengthMm,
      cornea: eye,
      elpCornea: options.elpCornea ?? eye,
      anteriorChamberDepthMm: eye.anteriorChamberDepthMm,
      negativeRadicand: options.srktNegativeRadicand ?? 'zero',
    },
    constants,
  );
  checkLensPlane(optics);
  if (adjusted.notice !== undefined) optics.notices.unshift(adjusted.notice);
  return optics;
}
