/** Asks the formulas of a plan about one eye and one lens model: each speaks, or says why it is silent. */
import {
  InvalidOptionError,
  MissingInputError,
  OutOfRangeError,
  prepareFormula,
  WrongConstantsError,
} from '@/formulas';
import type { FormulaId, PreparedEye, Spread } from '@/formulas';
import type {
  EyeHistory,
  Lens,
  LensConstant,
  MeasurementValues,
  PlanInput,
  Silenced,
} from '@/shared/contract';
import { geometryFor } from './effective-eye';
import type { UsedEye } from './effective-eye';
import { formulaOptions } from './plan-notices';
import { constantFor, silencedByDepth, silencedByHistory } from './silencing';

export interface ModelQuestion {
  lens: Lens;
  used: UsedEye;
  values: MeasurementValues;
  history: EyeHistory;
  input: PlanInput;
  /** Formulas in the order in which they would lead. */
  leading: readonly FormulaId[];
  spread: Spread;
  /** The power chosen for this model, if any. */
  chosenPowerD: number | null;
}

export interface Speaker {
  formula: FormulaId;
  constant: LensConstant;
  prepared: PreparedEye;
  exactPowerD: number;
}

export function listen(question: ModelQuestion): { speakers: Speaker[]; silenced: Silenced[] } {
  const speakers: Speaker[] = [];
  const silenced: Silenced[] = [];
  for (const formula of question.input.formulas) {
    const answer = ask(formula, question);
    if ('reason' in answer) silenced.push({ formula, ...answer });
    else speakers.push({ formula, ...answer });
  }
  return { speakers, silenced };
}

function ask(
  formula: FormulaId,
  { lens, used, values, history, input }: ModelQuestion,
): Omit<Speaker, 'formula'> | Omit<Silenced, 'formula'> {
  const silent = silencedByHistory(history) ?? silencedByDepth(formula, used, values);
  if (silent) return silent;
  const constant = constantFor(lens, formula, used.method);
  if ('reason' in constant) return constant;
  const eye = geometryFor(formula, used);
  const answer = unlessRefused(() => {
    const prepared = prepareFormula(formula, eye, constant.values, formulaOptions(input));
    return { constant, prepared, exactPowerD: prepared.powerAt(input.targetD) };
  });
  return answer instanceof Error ? { code: answer.name, reason: answer.message } : answer;
}

/** The core refuses by these, in words that name the input and its limit; anything else is a defect. */
const REFUSALS = [OutOfRangeError, MissingInputError, WrongConstantsError, InvalidOptionError];

export function unlessRefused<T>(calculate: () => T): T | Error {
  try {
    return calculate();
  } catch (error) {
    if (REFUSALS.some((Refusal) => error instanceof Refusal)) return error as Error;
    throw error;
  }
}
