/**
 * Gates — how many own cases a personalised constant needs before anything may be done with it.
 *
 * Inputs: caseCount, eyes of one lens model, formula, axial-length method and biometer; axial lengths in mm for the triple.
 * Result: below 20 show only; 20 to 49 provisional, not adopted; from 50 suggest; from 100 recommend. Haigis' three
 *   constants from 250 eyes whose middle 90 % of axial lengths spans at least 3 mm.
 * Outside the valid range: throws OutOfRangeError for a count that is no whole number from 0 on.
 * Source: proposed by this product, common practice [CP]; SD 0.45 D gives a standard error of the mean of 0.10 D at 20,
 *   0.064 at 50, 0.045 at 100 and 0.028 D at 250 eyes [D].
 * Erratum / variant: published minima (50 or more for one constant, 200 or more for three) are recalled with low
 *   confidence [M]. Eyes are counted, not patients; the standard error knows about patients.
 */
import { checkCount, checkValues } from '../statistics/checks';
import { quantile } from '../statistics/quantile';

export type Gate = 'show only' | 'provisional' | 'suggest' | 'recommend';

export const gateCases = { provisional: 20, suggest: 50, recommend: 100, triple: 250 } as const;

/** Between the 5 % and the 95 % quantile. */
export const TRIPLE_AXIAL_LENGTH_SPAN_MM = 3;

export function gateOf(caseCount: number): Gate {
  checkCount('caseCount', caseCount, 0);
  if (caseCount < gateCases.provisional) return 'show only';
  if (caseCount < gateCases.suggest) return 'provisional';
  return caseCount < gateCases.recommend ? 'suggest' : 'recommend';
}

/** A provisional constant is seen but not taken up. */
export function mayAdopt(gate: Gate): boolean {
  return gate === 'suggest' || gate === 'recommend';
}

export interface TripleGate {
  isOpen: boolean;
  caseCount: number;
  axialLengthSpanMm: number;
}

export function tripleGateOf(axialLengthsMm: readonly number[]): TripleGate {
  checkValues('gate of three constants', axialLengthsMm, 1);
  const axialLengthSpanMm = quantile(axialLengthsMm, 0.95) - quantile(axialLengthsMm, 0.05);
  const caseCount = axialLengthsMm.length;
  const isOpen = caseCount >= gateCases.triple && axialLengthSpanMm >= TRIPLE_AXIAL_LENGTH_SPAN_MM;
  return { isOpen, caseCount, axialLengthSpanMm };
}
