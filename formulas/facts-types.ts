/**
 * How far a formula has been checked, as data, so that the method page and the docblocks say the same.
 */
import type { FormulaId } from './types';

export type Mark = 'V' | 'N' | 'M' | 'D';

export const markMeanings: Record<Mark, string> = {
  V: 'read in the named text (mostly its abstract or an excerpt, not the whole paper)',
  N: 'recalled, and the equation reproduces a number read in a published text',
  M: 'recalled only: to be checked against the paper before clinical release',
  D: 'derived mathematically',
};

export const FROM_MEMORY_CAUTION = 'Equations from memory, not yet checked against print.';

export interface Equation {
  text: string;
  mark: Mark;
}

export interface Source {
  citation: string;
  mark: Mark;
}

export interface FormulaFacts {
  id: FormulaId;
  name: string;
  year: number;
  equations: readonly Equation[];
  /** The first is the one that the docblock names. */
  sources: readonly Source[];
  /** Where the formula's own assumptions hold or its published clamps act, in words. */
  validRange: string;
  notKnown: readonly string[];
  /** To be shown wherever a result of this formula is shown; null when the equations are more than memory. */
  caution: string | null;
}
