/** What the calculation has to say beside its numbers. */
import type { FormulaOptions } from '@/formulas';
import type { Candidate, ModelCalculation, PlanInput } from '@/shared/contract';

type Notices = ModelCalculation['notices'];

/** Spread of the formulas for one power, from which it is mentioned, and from which it is to be weighed (common practice). */
export const DISAGREEMENT_NOTE_D = 0.5;
export const DISAGREEMENT_WEIGH_D = 1;

export const formulaOptions = ({ axialLengthAdjustment }: PlanInput): FormulaOptions => ({
  axialLengthAdjustment,
});

export function rangeNotices(beyond: 'above' | 'below' | null, exactPowerD: number): Notices {
  if (!beyond) return [];
  const which = beyond === 'above' ? 'stronger than the strongest' : 'weaker than the weakest';
  return [
    {
      code: 'beyond-range',
      message: `The target asks for ${exactPowerD.toFixed(2)} D, ${which} that this model is made in; the nearest powers are shown.`,
    },
  ];
}

export function disagreementNotices(closest: Candidate | undefined): Notices {
  const spreadD = closest ? closest.highestD - closest.lowestD : 0;
  if (spreadD <= DISAGREEMENT_NOTE_D) return [];
  const weight =
    spreadD > DISAGREEMENT_WEIGH_D
      ? 'weigh which to trust, and measure again'
      : 'look at which measurement drives it';
  return [
    {
      code: spreadD > DISAGREEMENT_WEIGH_D ? 'formulas-disagree-weigh' : 'formulas-disagree-note',
      message: `The formulas differ by ${spreadD.toFixed(2)} D for the closest power: ${weight} (common practice).`,
    },
  ];
}
