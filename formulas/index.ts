/**
 * The only door of the numerical core: pure functions, no dependency, no input or output.
 */
export { formulaIds } from './types';
export type {
  AxialLengthAdjustment,
  CorneaRadii,
  EyeGeometry,
  FormulaId,
  FormulaOptions,
  LensConstants,
  NegativeRadicandRule,
  Notice,
  NoticeCode,
  PosteriorCornea,
  PowerResult,
  RefractionResult,
} from './types';

export { powerForRefraction, predictRefraction, prepareFormula } from './predict/predict';
export type { PreparedEye } from './predict/predict';

export { InvalidOptionError, MissingInputError, OutOfRangeError, WrongConstantsError } from './errors';
export type { Range } from './errors';
export { hardLimits } from './limits';

export { FORMULA_VERSION } from './version';
export { formulaFacts } from './facts';
export { markMeanings } from './facts-types';
export type { Equation, FormulaFacts, Mark, Source } from './facts-types';

export { constantKeys } from './constants/kinds';
export type { ConstantKey } from './constants/kinds';
export {
  aConstantFromSurgeonFactor,
  haigisDefaultsFromAConstant,
  pAcdFromAConstant,
  pAcdFromSurgeonFactor,
  surgeonFactorFromAConstant,
  surgeonFactorFromPAcd,
} from './constants/conversions';

export {
  keratometricCylinderD,
  keratometryDFromRadiusMm,
  meanKeratometryD,
  meanRadiusMm,
  radiusMmFromKeratometryD,
} from './units/corneal-power';
export { cornealFromSpectacleD, spectacleFromCornealD } from './units/vertex';
export { axisDifferenceDeg, degFromRad, normaliseAxisDeg, radFromDeg, roundAxisDeg } from './units/angle';

export { planToric } from './toric/plan-toric';
export type { ToricLens, ToricPlan, ToricQuestion } from './toric/plan-toric';
export type { SphereCylinder } from './optics/symmetric-matrix';

export { landing, prepareLanding } from './spread/landing';
export type { Landing, LandingEye, LandingPart, PreparedLanding } from './spread/landing';
export { defaultSpread, OWN_RESULTS_FROM_CASES, spreadOfOwnResults } from './spread/default-spread';
export type { AxialLengthMethod, DefaultSpreadOptions } from './spread/default-spread';
export type { Spread, SpreadInput, SpreadMark, SpreadPart } from './spread/spread';
export { normalCdf } from './spread/normal';
