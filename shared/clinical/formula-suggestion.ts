/**
 * Which formula to lead with, by axial length. A suggestion with its source; the choice is the surgeon's.
 */
import type { FormulaId } from '@/formulas';

export interface FormulaSuggestion {
  /** In order: the first that gives a result leads. */
  formulas: FormulaId[];
  reason: string;
  source: string;
  mark: string;
}

const SHORT_BELOW_MM = 22;
const LONG_ABOVE_MM = 26;
/** From here SRK/T and Holladay 1 are known to miss, unless the length is adjusted. */
const CAUTION_ABOVE_MM = 26.5;

const SHORT: FormulaSuggestion = {
  formulas: ['haigis', 'hofferQ'],
  reason: 'Short eye, below 22.00 mm: Haigis or Hoffer Q.',
  source: 'NICE NG77 (2017) 1.3 [M]; Eye 2021 review, PMC8376990 [V]',
  mark: 'M',
};
const USUAL: FormulaSuggestion = {
  formulas: ['srkt', 'holladay1'],
  reason: 'Axial length 22.00 to 26.00 mm: SRK/T; Holladay 1 equally acceptable in a large audit.',
  source: 'NICE NG77 (2017) 1.3 [M]; Aristodemou et al., JCRS 2011, 8,108 eyes [M]',
  mark: 'M',
};
const LONG: FormulaSuggestion = {
  formulas: ['haigis', 'srkt'],
  reason: 'Long eye, above 26.00 mm: Haigis or SRK/T.',
  source: 'NICE NG77 (2017) 1.3 [M]; Eye 2021 review, PMC8376990 [V]',
  mark: 'M',
};
const VERY_LONG: FormulaSuggestion = {
  ...LONG,
  reason: `${LONG.reason} Caution above 26.50 mm: SRK/T and Holladay 1 without an adjusted axial length tend to a farsighted surprise.`,
  source: `${LONG.source}; Wang et al., JCRS 2011;37:2018-2027 and 2018;44:1396-1397 [M]`,
};

/** Axial length in mm, 14 to 40. */
export function suggestFormulas(axialLengthMm: number): FormulaSuggestion {
  if (axialLengthMm < SHORT_BELOW_MM) return SHORT;
  if (axialLengthMm <= LONG_ABOVE_MM) return USUAL;
  return axialLengthMm <= CAUTION_ABOVE_MM ? LONG : VERY_LONG;
}
