/** The flags that the published checks raise for a measured eye. */
import type { Eye, Flag, Measurement } from '@/shared/contract';

export interface MeasuredEyeFacts {
  measurement: Measurement;
  fellowMeasurement: Measurement | null;
  eye: Eye;
  /** ISO date. */
  today: string;
}

export function raisedFlags(_facts: MeasuredEyeFacts): Flag[] {
  return [];
}
