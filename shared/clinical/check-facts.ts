/** What the checks look at: one eye, its fellow, the person, and the day. */
import type { Eye, Flag, Measurement, Patient } from '@/shared/contract';
import { CHECK_LIMITS, type CheckLimits } from './check-thresholds';
import { chamberDepthMm, usedEye } from './effective-eye';

export interface CheckQuestion {
  measurement: Measurement;
  /** The one of record of the other eye. */
  fellowMeasurement: Measurement | null;
  eye: Eye;
  fellowEye: Eye | null;
  patient: Pick<Patient, 'birthDate'>;
  /** ISO date. */
  today: string;
  /** The practice's own, where they differ from the published ones. */
  limits?: CheckLimits;
}

export interface CheckFacts extends CheckQuestion {
  values: Measurement['values'];
  fellow: Measurement['values'] | null;
  /** Null too when the fellow eye has no natural lens any more: an artificial one is no measure. */
  fellowLensThicknessMm: number | null;
  history: Eye['history'];
  axialLengthMm: number;
  meanKeratometryD: number;
  cornealCylinderD: number;
  meanRadiusMm: number;
  /** From the epithelium. */
  chamberDepthMm: number | null;
  isUltrasound: boolean;
  /** Not known to be anything else: a missing answer does not switch a check off. */
  mayBePhakic: boolean;
  limits: CheckLimits;
}

export type Finding = Pick<Flag, 'severity' | 'message' | 'advice'>;

/** One check: null when it is content. */
export interface CheckRule {
  id: string;
  source: string;
  mark: Flag['mark'];
  /** False for a stop that no reason can make up for; true when absent. */
  canBeSettled?: false;
  judge: (facts: CheckFacts) => Finding | null;
}

export function checkFacts(question: CheckQuestion): CheckFacts {
  const { measurement, fellowMeasurement, eye, fellowEye } = question;
  const { values } = measurement;
  const fellow = fellowMeasurement?.values ?? null;
  const { axialLengthMm, meanKeratometryD, cornealCylinderD } = usedEye(values);
  return {
    ...question,
    values,
    fellow,
    fellowLensThicknessMm: fellow && mayBePhakic(fellowEye) ? fellow.lensThicknessMm : null,
    history: eye.history,
    axialLengthMm,
    meanKeratometryD,
    cornealCylinderD,
    meanRadiusMm: (values.flatRadiusMm + values.steepRadiusMm) / 2,
    chamberDepthMm: chamberDepthMm(values),
    isUltrasound: values.method !== 'optical',
    mayBePhakic: mayBePhakic(eye),
    limits: question.limits ?? CHECK_LIMITS,
  };
}

const mayBePhakic = (eye: Eye | null): boolean => (eye?.history.lensStatus ?? 'phakic') === 'phakic';
