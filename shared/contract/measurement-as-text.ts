/** The inverse of `readMeasurement`: values as somebody would type them, for forms that start from a measurement. */
import type { MeasurementValues } from './measurement';
import { MEASUREMENT_TEXT_FIELDS, type MeasurementText, type MeasurementTextField } from './measurement-text';

export function measurementAsText(values: MeasurementValues): Record<MeasurementTextField, string> {
  const text: MeasurementText = {};
  for (const field of MEASUREMENT_TEXT_FIELDS) text[field] = asText(values[field]);
  return text as Record<MeasurementTextField, string>;
}

function asText(value: string | number | null): string {
  if (value === null) return '';
  const text = String(value);
  // Tiny numbers would come out with an exponent, which no field takes.
  return typeof value === 'number' && text.includes('e') ? value.toFixed(9) : text;
}
