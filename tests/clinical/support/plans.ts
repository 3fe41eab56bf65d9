/** Invented plans: one optically measured eye, one lens model, every formula. */
import { formulaIds } from '@/formulas';
import { calculatePlan, type PlanQuestion } from '@/shared/clinical/plan-calculation';
import type { Flag, MeasurementValues, PlanCalculation, PlanInput } from '@/shared/contract';
import { aMeasurement, anEye, PLAIN_VALUES } from './eyes';
import { aLensModel } from './lenses';

const LENS = aLensModel();

export const anInput = (change: Partial<PlanInput> = {}): PlanInput => ({
  measurementId: aMeasurement(PLAIN_VALUES).id,
  targetD: -0.25,
  toleranceD: 0.5,
  formulas: [...formulaIds],
  leadingFormula: null,
  lensIds: [LENS.id],
  axialLengthAdjustment: 'none',
  note: '',
  ...change,
});

export interface PlanCase extends Partial<Omit<PlanQuestion, 'input' | 'measurement' | 'flags'>> {
  values?: Partial<MeasurementValues>;
  input?: Partial<PlanInput>;
  /** Rule ids that the checks raised. */
  raised?: string[];
}

export const aPlanQuestion = ({ values, input, raised = [], ...rest }: PlanCase = {}): PlanQuestion => ({
  eye: anEye(),
  measurement: aMeasurement({ ...PLAIN_VALUES, ...values }),
  lenses: [LENS],
  choice: null,
  flags: raised.map(aFlag),
  ...rest,
  input: anInput(input),
});

const aFlag = (ruleId: string): Flag => ({
  ruleId,
  severity: 'weigh',
  message: 'invented',
  advice: 'invented',
  source: 'invented',
  mark: 'CP',
  canBeSettled: true,
  settlement: null,
});

export const calculate = (given: PlanCase = {}): PlanCalculation => calculatePlan(aPlanQuestion(given));

/** The one model of the calculation. */
export function modelOf(calculation: PlanCalculation): PlanCalculation['models'][number] {
  const [model] = calculation.models;
  if (!model) throw new Error('There is one model');
  return model;
}

export const theModel = (given: PlanCase = {}) => modelOf(calculate(given));
