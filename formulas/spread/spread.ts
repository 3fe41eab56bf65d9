/**
 * The spread of a prediction as a list of independent parts: plain data, so that a signed plan can keep it.
 */
export type SpreadMark = 'V' | 'D' | 'M' | 'CP';

/** What a part's standard deviation is of. */
export type SpreadInput =
  /** Measurements, carried through the formula. */
  | 'axialLengthMm'
  | 'keratometryD'
  | 'anteriorChamberDepthMm'
  /** The lens plane itself: what no measurement says about where the lens settles. */
  | 'lensPositionMm'
  /** The lens power against its label. */
  | 'lensPowerD'
  /** Added to the refraction as it is. */
  | 'refractionD';

export interface SpreadPart {
  /** In words, as it is shown. */
  source: string;
  input: SpreadInput;
  /** Standard deviation in the input's unit. 'isoTolerance': from the labelled power, see iso-tolerance.ts. */
  sd: number | 'isoTolerance';
  /** Where the figure comes from. */
  mark: SpreadMark;
  reference: string;
}

export interface Spread {
  parts: readonly SpreadPart[];
  /** Every part is wider by this factor, from own results; 1 when absent. */
  scale?: number;
}
