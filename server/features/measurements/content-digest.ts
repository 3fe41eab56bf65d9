/** Digest of a measurement's values: the same values of the same eye are the same measurement. */
import { hash } from 'node:crypto';
import type { MeasurementValues } from '@/shared/contract';

export function contentDigest(values: MeasurementValues): string {
  return hash('sha256', JSON.stringify(DIGESTED.map((field) => values[field])), 'hex');
}

/** Fixed for ever: another order or list would make every stored measurement look new. */
const DIGESTED: readonly (keyof MeasurementValues)[] = [
  'measuredAt',
  'method',
  'device',
  'axialLengthMm',
  'axialLengthSdMm',
  'flatRadiusMm',
  'steepRadiusMm',
  'flatKD',
  'steepKD',
  'keratometricIndex',
  'flatAxisDeg',
  'steepAxisDeg',
  'acdMm',
  'acdFrom',
  'lensThicknessMm',
  'cornealThicknessUm',
  'whiteToWhiteMm',
  'pupilMm',
  'operator',
  'remarks',
];
