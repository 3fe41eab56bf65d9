/** What the calculation of one model has to say beside its numbers. */
import type { FormulaId, FormulaOptions } from '@/formulas';
import { FORMULA_NAMES } from '@/shared/contract';
import type { Candidate, ModelCalculation, PlanInput } from '@/shared/contract';
import { CHECK_LIMITS } from './check-thresholds';
import { isAbove } from './limits';
import { signedD } from './number-words';

type Notices = ModelCalculation['notices'];

export const formulaOptions = ({ axialLengthAdjustment }: PlanInput): FormulaOptions => ({
  axialLengthAdjustment,
});

export function rangeNotices(beyond: 'above' | 'below' | null, exactPowerD: number): Notices {
  if (!beyond) return [];
  const which = beyond === 'above' ? 'stronger than the strongest' : 'weaker than the weakest';
  return [
    {
      code: 'beyond-range',
      message: `The target asks for ${signedD(exactPowerD)} D, ${which} that this model is made in; the nearest powers are shown.`,
    },
  ];
}

/** Another formula leads than the one that was asked to. */
export function leadingNotices(asked: FormulaId | undefined, leads: FormulaId): Notices {
  if (asked === undefined || asked === leads) return [];
  return [
    {
      code: 'leading-formula-silent',
      message: `${FORMULA_NAMES[asked]} should lead and is silent here; ${FORMULA_NAMES[leads]} leads in its place.`,
    },
  ];
}

/** Toric models are compared by their spherical equivalent. */
export function toricNotices(isToric: boolean): Notices {
  if (!isToric) return [];
  return [
    {
      code: 'toric-not-planned',
      message:
        'Toric model: powers and refractions are spherical equivalents; cylinder and axis are not part of this plan.',
    },
  ];
}

/** Common practice; above the higher limit the chosen power carries a flag to weigh as well. */
export function disagreementNotices(closest: Candidate | undefined): Notices {
  const { note, weigh } = CHECK_LIMITS.formulaDisagreementD;
  const spreadD = closest ? closest.highestD - closest.lowestD : 0;
  if (!isAbove(spreadD, note)) return [];
  const isLarge = isAbove(spreadD, weigh);
  const weight = isLarge ? 'weigh which to trust, and measure again' : 'look at which measurement drives it';
  return [
    {
      code: isLarge ? 'formulas-disagree-weigh' : 'formulas-disagree-note',
      message: `The formulas differ by ${spreadD.toFixed(2)} D for the closest power: ${weight} (common practice).`,
    },
  ];
}
