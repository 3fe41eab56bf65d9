/**
 * The calculation of one plan: for every lens model the candidate powers, each formula's prediction, and where
 * the refraction lands. Pure: the same inputs give the same result on the server, in the client and years later.
 */
import { FORMULA_VERSION } from '@/formulas';
import type { Eye, Flag, Lens, Measurement, PlanCalculation, PlanChoice, PlanInput } from '@/shared/contract';
import { usedEye } from './effective-eye';
import { suggestFormulas } from './formula-suggestion';
import { calculateModel } from './model-calculation';

export interface PlanQuestion {
  eye: Eye;
  measurement: Measurement;
  /** In the order in which they are shown. */
  lenses: readonly Lens[];
  input: PlanInput;
  flags: readonly Flag[];
  choice: PlanChoice | null;
}

export function calculatePlan({
  eye,
  measurement,
  lenses,
  input,
  flags,
  choice,
}: PlanQuestion): PlanCalculation {
  const used = usedEye(measurement.values);
  const suggestion = suggestFormulas(used.axialLengthMm);
  const leading = input.leadingFormula ? [input.leadingFormula] : suggestion.formulas;
  return {
    formulaVersion: FORMULA_VERSION,
    eye: used,
    targetD: input.targetD,
    toleranceD: input.toleranceD,
    suggestion,
    models: lenses.map((lens) =>
      calculateModel({
        lens,
        used,
        values: measurement.values,
        history: eye.history,
        input,
        leading,
        chosenPowerD: choice?.lensId === lens.id ? choice.powerD : null,
      }),
    ),
    flags: [...flags],
  };
}
