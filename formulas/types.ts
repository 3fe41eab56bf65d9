/**
 * The words of the door: what goes into a formula and what comes out.
 */
export type FormulaId = 'srkt' | 't2' | 'holladay1' | 'hofferQ' | 'haigis';

/** In the order in which they are listed. */
export const formulaIds = ['srkt', 't2', 'holladay1', 'hofferQ', 'haigis'] as const satisfies FormulaId[];

/** Radii of the corneal front surface in its two principal meridians. */
export interface CorneaRadii {
  flatRadiusMm: number;
  steepRadiusMm: number;
}

export interface EyeGeometry extends CorneaRadii {
  axialLengthMm: number;
  /** From the corneal epithelium to the front of the lens. */
  anteriorChamberDepthMm?: number;
}

/** SRK/T and T2 | Holladay 1 | Hoffer Q | Haigis. */
export type LensConstants =
  | { aConstant: number }
  | { surgeonFactorMm: number }
  | { pAcdMm: number }
  | { a0Mm: number; a1: number; a2: number };

export type AxialLengthAdjustment = 'none' | 'wangKoch2011' | 'wangKoch2018';
export type NegativeRadicandRule = 'zero' | 'absolute';
export type PosteriorCornea = 'none' | 'abulafiaKoch2016' | 'goggin2015';

export interface FormulaOptions {
  /** Distance from spectacle lens to cornea; 12 when absent. */
  vertexMm?: number;
  /** Double-K: the cornea before refractive surgery, for the lens position only. */
  elpCornea?: CorneaRadii;
  /** 'none' when absent. */
  axialLengthAdjustment?: AxialLengthAdjustment;
  /** 'zero' when absent. */
  srktNegativeRadicand?: NegativeRadicandRule;
}

export type NoticeCode =
  | 'srkt-negative-radicand'
  | 'holladay1-radius-floor'
  | 'holladay1-angle-cap'
  | 'hofferQ-axial-length-clamp'
  | 'hofferQ-acd-unusual'
  | 'axial-length-adjusted'
  | 'axial-length-adjustment-held'
  | 'axial-length-adjustment-unpublished'
  | 'double-k-not-used'
  | 'goggin-not-applied';

/** Something a formula did that its reader has to know. Never a failure: failures are thrown. */
export interface Notice {
  code: NoticeCode;
  message: string;
}

export interface RefractionResult {
  refractionD: number;
  elpMm: number;
  notices: Notice[];
}

export interface PowerResult {
  powerD: number;
  elpMm: number;
  notices: Notice[];
}
