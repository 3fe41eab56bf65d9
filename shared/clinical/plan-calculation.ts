/**
 * The calculation of one plan: for every lens model the candidate powers, each formula's prediction, and where
 * the refraction lands. Pure: the same inputs give the same result on the server, in the client and years later.
 */
import { FORMULA_VERSION } from '@/formulas';
import type { Eye, Flag, Lens, Measurement, PlanCalculation, PlanChoice, PlanInput } from '@/shared/contract';
import { usedEye } from './effective-eye';
import { suggestFormulas } from './formula-suggestion';
import { calculateModel } from './model-calculation';
import { checkPlan } from './plan-flags';
import { spreadFor } from './spread-choice';

export interface PlanQuestion {
  eye: Eye;
  measurement: Measurement;
  /** In the order in which they are shown. */
  lenses: readonly Lens[];
  input: PlanInput;
  /** Of the measurement; those of the decisions are added. */
  flags: readonly Flag[];
  choice: PlanChoice | null;
}

export function calculatePlan(question: PlanQuestion): PlanCalculation {
  const { eye, measurement, lenses, input, flags, choice } = question;
  const used = usedEye(measurement.values);
  const suggestion = suggestFormulas(used.axialLengthMm);
  const leading = [...(input.leadingFormula ? [input.leadingFormula] : []), ...suggestion.formulas];
  const spread = spreadFor(measurement.values, flags);
  const models = lenses.map((lens) =>
    calculateModel({
      lens,
      used,
      values: measurement.values,
      history: eye.history,
      input,
      leading,
      spread,
      chosenPowerD: choice?.lensId === lens.id ? choice.powerD : null,
    }),
  );
  return {
    formulaVersion: FORMULA_VERSION,
    eye: used,
    // Not -0, which no text keeps.
    targetD: input.targetD + 0,
    toleranceD: input.toleranceD,
    suggestion,
    models,
    flags: [...flags, ...checkPlan({ input, choice, axialLengthMm: used.axialLengthMm, models })],
  };
}
