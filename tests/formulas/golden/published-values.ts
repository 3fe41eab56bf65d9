/**
 * Numbers that stand in published texts, each with where it was read. No complete worked example (inputs and
 * outputs) of SRK/T, Hoffer Q, Haigis or T2 could be read in a primary paper.
 */

/** Aramberri, J Cataract Refract Surg 2005;31:255-256: no corneal height beyond this length at K 45. */
export const aramberriLimit = { keratometryD: 45, axialLengthMm: 33.12 };

/** Holladay, J Cataract Refract Surg 2003;29:176-197, as quoted on a teaching page. */
export const holladayConstants = { aConstant: 118.5, pAcdMm: 5.26, surgeonFactorMm: 1.51 };

/** Teaching page on double-K: Holladay 1, AL 24.5 mm, A 118.9, emmetropia. The surgeon factor is not stated there. */
export const holladayPowers = [
  { keratometryD: 39, powerD: 23.3, withDerivedFactorD: 23.34 },
  { keratometryD: 36, powerD: 26.6, withDerivedFactorD: 26.68 },
  { keratometryD: 32, powerD: 30.9, withDerivedFactorD: 30.9 },
];
/** Gives all three to the printed digit. */
export const HOLLADAY_FITTED_FACTOR_MM = 1.716;
/** 0.5663 * 118.9 - 65.60. */
export const HOLLADAY_DERIVED_FACTOR_MM = 1.73307;
