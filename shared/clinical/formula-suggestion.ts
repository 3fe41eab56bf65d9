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

interface Band {
  /** Axial length below which the band ends, mm; the last is open. */
  belowMm: number;
  suggestion: FormulaSuggestion;
}

const BANDS: readonly Band[] = [
  {
    belowMm: 22,
    suggestion: {
      formulas: ['haigis', 'hofferQ'],
      reason: 'Short eye, below 22.00 mm: Haigis or Hoffer Q.',
      source: 'NICE NG77 (2017) 1.3 [M]; Eye 2021 review, PMC8376990 [V]',
      mark: 'M',
    },
  },
  {
    belowMm: 26.000001,
    suggestion: {
      formulas: ['srkt', 'holladay1'],
      reason: 'Axial length 22.00 to 26.00 mm: SRK/T; Holladay 1 equally acceptable in a large audit.',
      source: 'NICE NG77 (2017) 1.3; Aristodemou et al., JCRS 2011, 8,108 eyes',
      mark: 'M',
    },
  },
  {
    belowMm: Number.POSITIVE_INFINITY,
    suggestion: {
      formulas: ['haigis', 'srkt'],
      reason:
        'Long eye, above 26.00 mm: Haigis or SRK/T. SRK/T and Holladay 1 without adjustment tend to a farsighted surprise above 26.5 mm.',
      source: 'NICE NG77 (2017) 1.3 [M]; Eye 2021 review, PMC8376990 [V]',
      mark: 'M',
    },
  },
];

/** Axial length in mm, 14 to 40. */
export function suggestFormulas(axialLengthMm: number): FormulaSuggestion {
  const band = BANDS.find(({ belowMm }) => axialLengthMm < belowMm) ?? BANDS.at(-1);
  if (!band) throw new Error('There is a band for every length');
  return band.suggestion;
}
