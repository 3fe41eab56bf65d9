/** What the checks look at: one eye, its fellow, and the day. */
import type { Eye, Flag, Measurement } from '@/shared/contract';
import { chamberDepthMm, usedEye } from './effective-eye';

export interface CheckQuestion {
  measurement: Measurement;
  fellowMeasurement: Measurement | null;
  eye: Eye;
  /** ISO date. */
  today: string;
}

export interface CheckFacts extends CheckQuestion {
  values: Measurement['values'];
  fellow: Measurement['values'] | null;
  history: Eye['history'];
  axialLengthMm: number;
  meanKeratometryD: number;
  cornealCylinderD: number;
  meanRadiusMm: number;
  chamberDepthMm: number | null;
  isUltrasound: boolean;
  /** Days since the measurement. */
  ageDays: number;
}

/** One check: null when it is content. */
export interface CheckRule {
  id: string;
  source: string;
  mark: Flag['mark'];
  judge: (facts: CheckFacts) => Pick<Flag, 'severity' | 'message' | 'advice'> | null;
}

const DAY_MS = 86_400_000;

export function checkFacts(question: CheckQuestion): CheckFacts {
  const { measurement, fellowMeasurement, eye, today } = question;
  const { values } = measurement;
  const { axialLengthMm, meanKeratometryD, cornealCylinderD } = usedEye(values);
  return {
    ...question,
    values,
    fellow: fellowMeasurement?.values ?? null,
    history: eye.history,
    axialLengthMm,
    meanKeratometryD,
    cornealCylinderD,
    meanRadiusMm: (values.flatRadiusMm + values.steepRadiusMm) / 2,
    chamberDepthMm: chamberDepthMm(values),
    isUltrasound: values.method !== 'optical',
    ageDays: (Date.parse(today) - Date.parse(values.measuredAt)) / DAY_MS,
  };
}
