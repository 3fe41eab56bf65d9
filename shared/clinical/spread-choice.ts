/**
 * Which published spread fits an eye. Nobody records why ultrasound was taken; that optical biometry could not read
 * this eye is concluded from what is stored, and assumed where that is missing.
 */
import { defaultSpread } from '@/formulas';
import type { Spread } from '@/formulas';
import type { Flag, MeasurementValues } from '@/shared/contract';

/** The fellow eye was read optically, or the lens is thick or swollen. */
const EVIDENCE = ['between-eyes-method', 'thick-lens', 'swollen-lens'];

export function spreadFor(
  { method, lensThicknessMm }: Pick<MeasurementValues, 'method' | 'lensThicknessMm'>,
  flags: readonly Pick<Flag, 'ruleId'>[],
): Spread {
  if (method === 'optical') return defaultSpread(method);
  const hasEvidence = flags.some(({ ruleId }) => EVIDENCE.includes(ruleId));
  return defaultSpread(method, { hasOpticalFailed: hasEvidence || lensThicknessMm === null });
}
