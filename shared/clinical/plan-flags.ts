/**
 * Checks of the decisions themselves: target, power, and how far the formulas agree on it. They stand beside the
 * flags of the measurement and are acknowledged the same way.
 */
import type { Candidate, Flag, ModelCalculation, PlanChoice, PlanInput } from '@/shared/contract';
import { CHECK_LIMITS, type CheckLimits } from './check-thresholds';
import type { Finding } from './check-facts';
import { isAbove, isBelow } from './limits';
import { chancePercent, signedD } from './number-words';

export interface PlanFlagQuestion {
  input: PlanInput;
  choice: PlanChoice | null;
  axialLengthMm: number;
  models: readonly ModelCalculation[];
  limits?: CheckLimits;
}

interface PlanFacts extends PlanFlagQuestion {
  limits: CheckLimits;
  model: ModelCalculation | undefined;
  chosen: Candidate | undefined;
}

interface PlanRule {
  id: string;
  source: string;
  mark: Flag['mark'];
  judge: (facts: PlanFacts) => Finding | null;
}

const PLAN_RULES: readonly PlanRule[] = [
  {
    id: 'target-unusual',
    source: 'common practice: −3.00 to +0.25 D',
    mark: 'CP',
    judge: ({ input: { targetD }, limits: { targetD: band } }) => {
      if (isAbove(targetD, band.high)) {
        return {
          severity: 'weigh',
          message: `The target ${signedD(targetD)} D is farsighted`,
          advice: 'Check the sign; nothing is sharp without glasses at a farsighted target.',
        };
      }
      return isBelow(targetD, band.low)
        ? {
            severity: 'weigh',
            message: `The target ${signedD(targetD)} D is more nearsighted than ${signedD(band.low)} D`,
            advice: 'Check the sign, and the refraction of the other eye.',
          }
        : null;
    },
  },
  {
    id: 'power-unusual',
    source:
      'common practice: +6 to +30 D; the wrong sign was the cause of 9 of 178 wrong lenses (Steeples et al., Eye 2016 [V])',
    mark: 'CP',
    judge: ({ choice, limits: { powerD: band } }) => {
      if (!choice || (!isBelow(choice.powerD, band.low) && !isAbove(choice.powerD, band.high))) return null;
      const isMinus = choice.powerD < 0;
      return {
        severity: 'weigh',
        message: isMinus
          ? `The chosen power ${signedD(choice.powerD)} D is a minus lens`
          : `The chosen power ${signedD(choice.powerD)} D is unusual`,
        advice: 'Read the sign aloud, here and at the table, and check that the lens is in stock.',
      };
    },
  },
  {
    id: 'formulas-disagree',
    source: 'common practice: more than 1.00 D between formulas for the same lens',
    mark: 'CP',
    judge: ({ chosen, limits: { formulaDisagreementD } }) =>
      chosen && isAbove(chosen.highestD - chosen.lowestD, formulaDisagreementD.weigh)
        ? {
            severity: 'weigh',
            message: `The formulas differ by ${(chosen.highestD - chosen.lowestD).toFixed(2)} D for the chosen power`,
            advice: 'Look which measurement drives it, and weigh which formula to trust in this eye.',
          }
        : null,
  },
  {
    id: 'long-eye-unadjusted',
    source:
      'hyperopic surprise of SRK/T and Holladay 1 in long eyes; adjustment by Wang et al., JCRS 2011;37:2018-2027, and Wang, Koch, JCRS 2018;44:1396-1397',
    mark: 'M',
    judge: ({ axialLengthMm, input: { axialLengthAdjustment }, model, limits }) => {
      const isLong = isAbove(axialLengthMm, limits.unadjustedAxialLengthMm);
      const isAffected = model?.leadingFormula === 'srkt' || model?.leadingFormula === 'holladay1';
      return isLong && isAffected && axialLengthAdjustment === 'none'
        ? {
            severity: 'weigh',
            message: `The leading formula tends to a farsighted surprise above ${limits.unadjustedAxialLengthMm.toFixed(1)} mm of axial length`,
            advice: 'Take an adjusted axial length, or lead with Haigis.',
          }
        : null;
    },
  },
  {
    id: 'not-closest',
    source: 'derived from the landings of this plan',
    mark: 'D',
    judge: ({ model, chosen }) => {
      const closest = model?.candidates.find(({ isClosest }) => isClosest);
      return chosen && closest && chosen !== closest
        ? {
            severity: 'note',
            message: `Another power has the better chance of landing: ${signedD(closest.powerD)} D with ${chancePercent(closest.landing.chance)} %, the chosen ${signedD(chosen.powerD)} D with ${chancePercent(chosen.landing.chance)} %`,
            advice: 'The choice is yours; make sure that it is meant.',
          }
        : null;
    },
  },
];

export function checkPlan(question: PlanFlagQuestion): Flag[] {
  const { choice, models, limits = CHECK_LIMITS } = question;
  const model = models.find(({ lensId }) => lensId === choice?.lensId);
  const chosen = model?.candidates.find(({ powerD }) => powerD === choice?.powerD);
  return PLAN_RULES.flatMap(({ id, source, mark, judge }) => {
    const finding = judge({ ...question, limits, model, chosen });
    return finding ? [{ ruleId: id, source, mark, canBeSettled: false, settlement: null, ...finding }] : [];
  });
}
