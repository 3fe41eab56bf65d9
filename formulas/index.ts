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

export { methodMarkMeanings } from './method-facts';
export type { MethodFacts, MethodMark } from './method-facts';
export { solverFacts } from './solvers/facts';
export { statisticsFacts } from './statistics/facts';
export { personalisationFacts } from './personalisation/facts';

export { DivergedError } from './solvers/diverged-error';
export { findRoot } from './solvers/root';
export { randomFromSeed } from './solvers/random';
export type { RandomSource } from './solvers/random';

export { DegenerateDataError, TooFewValuesError, UnequalLengthsError } from './statistics/errors';
export { mean, sampleSd, sampleVariance } from './statistics/mean-and-deviation';
export { median, quantile } from './statistics/quantile';
export { meanAbsoluteError, medianAbsoluteError } from './statistics/absolute-error';
export { errorBandsD, isWithinBand, shareWithin, summariseErrors } from './statistics/error-summary';
export type { BandShare, ErrorSummary } from './statistics/error-summary';
export { wilsonInterval } from './statistics/wilson-interval';
export type { Interval } from './statistics/wilson-interval';
export { clusteredMean, designEffect } from './statistics/clustered-mean';
export type { Cluster, ClusteredMean } from './statistics/clustered-mean';
export { normalQuantile } from './statistics/normal-quantile';
export { studentCdf, studentQuantile, studentTwoSided } from './statistics/student-t';
export { chiSquareQuantile, chiSquareUpperTail, fQuantile, fUpperTail } from './statistics/f-and-chi-square';
export { trimmedMean, winsorisedVariance } from './statistics/trimmed';
export { yuenPairedTest } from './statistics/yuen-paired';
export type { PairedTest } from './statistics/yuen-paired';
export { comparePairedDeviations } from './statistics/compare-deviations';
export type { DeviationComparison } from './statistics/compare-deviations';
export { comparePairwise } from './statistics/compare-formulas';
export type { PairComparison } from './statistics/compare-formulas';
export { holmAdjusted } from './statistics/holm';
export { mcNemarTest, mcNemarWithin } from './statistics/mcnemar';
export type { McNemarResult } from './statistics/mcnemar';
export { cochranQ } from './statistics/cochran-q';
export type { CochranResult } from './statistics/cochran-q';
export { bootstrapPercentile, bootstrapTrimmedMean } from './statistics/bootstrap';
export { centroidOf, doubleAngleEllipse } from './statistics/double-angle-ellipse';
export type { Ellipse, EllipseOf } from './statistics/double-angle-ellipse';
export { foldOfEach, oneEyePerPatient, outOfSampleErrors } from './statistics/k-fold';
export { astigmatismFromVector, vectorFromAstigmatism } from './toric/astigmatism';
export type { Astigmatism, AstigmatismVector } from './toric/astigmatism';

export { MixedOriginsError, NoConstantError, UnusableCaseError } from './personalisation/errors';
export type { CohortQuestion, OutcomeCase } from './personalisation/cohort';
export type { MeasurementOrigin } from './personalisation/origin';
export { sortCases } from './personalisation/usable-cases';
export { personalConstants, personalValue, withPersonalValue } from './personalisation/personal-constant';
export { findIdealConstant, findLensPlane } from './personalisation/lens-position';
export { zeroMeanErrorConstant } from './personalisation/zero-mean-error';
export type { ZeroedConstant } from './personalisation/zero-mean-error';
export { PRIOR_SD_D, shrinkToPublished } from './personalisation/shrinkage';
export type { ShrunkConstant } from './personalisation/shrinkage';
export { haigisTriple } from './personalisation/haigis-triple';
export type { HaigisTriple } from './personalisation/haigis-triple';
export { outOfSampleEffect } from './personalisation/out-of-sample';
export type { OutOfSampleEffect, OutOfSampleQuestion } from './personalisation/out-of-sample';
export { gateCases, gateOf, mayAdopt, tripleGateOf } from './personalisation/gates';
export type { Gate, TripleGate } from './personalisation/gates';
export { casesNeeded } from './personalisation/cases-needed';
export { groupByAxialLength } from './personalisation/axial-length-groups';
export type { AxialLengthGroup } from './personalisation/axial-length-groups';
export { casesToReview } from './personalisation/review';
export type { CaseToReview } from './personalisation/review';
export { expectedErrorSdD } from './personalisation/expected-error';
export { scaledSpread, spreadScaleOf } from './personalisation/spread-scale';
export type { SpreadOutcome, SpreadScale } from './personalisation/spread-scale';
export { proposeConstant } from './personalisation/propose';
export type { ConstantProposal, ProposalQuestion } from './personalisation/propose';
