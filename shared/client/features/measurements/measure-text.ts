/** What the form of a measurement holds: text as typed, for every field and for superseding another. */
import { MEASUREMENT_TEXT_FIELDS } from '@/shared/contract';
import type { MeasurementTextField } from '@/shared/contract';

export type MeasureText = Record<MeasurementTextField | 'reason' | 'supersedesId', string>;

export const EMPTY_MEASURE_TEXT = Object.fromEntries(
  [...MEASUREMENT_TEXT_FIELDS, 'reason', 'supersedesId'].map((field) => [field, '']),
) as MeasureText;
