/**
 * Whether a signed plan still stands on what it was signed on. Compared at every reading, so that no change
 * can forget to say so.
 */
import { FORMULA_VERSION } from '@/formulas';
import type { Eye, Lens, Measurement, Patient, PlanSnapshot } from '@/shared/contract';
import { canonicalJson } from './canonical-json';
import { findFrozen, MISMATCH, type StoredText } from './signed-snapshot';

export interface PresentFacts {
  patient: Patient;
  eye: Eye;
  /** All of this eye, newest first. */
  measurements: readonly Measurement[];
  lenses: readonly Lens[];
}

const IDENTITY = ['recordNumber', 'familyName', 'givenName', 'birthDate', 'sex'] as const;
const isSame = (a: unknown, b: unknown): boolean => canonicalJson(a) === canonicalJson(b);

/** The same of a plan as it is stored. */
export function reasonsSinceSigning(stored: StoredText, present: PresentFacts): string[] {
  const signed = findFrozen(stored);
  return signed ? outOfDateReasons(signed, present) : [MISMATCH];
}

/** In words; empty while everything is as it was signed. */
export function outOfDateReasons(signed: PlanSnapshot, present: PresentFacts): string[] {
  return [
    ...(IDENTITY.some((field) => signed.patient[field] !== present.patient[field])
      ? ["The patient's name, birth date, sex or record number was corrected"]
      : []),
    ...(isSame(signed.eye.history, present.eye.history) ? [] : ["The eye's history was changed"]),
    ...measurementReasons(signed, present.measurements),
    ...lensReasons(signed, present.lenses),
    ...(signed.calculation.formulaVersion === FORMULA_VERSION
      ? []
      : [`The formulas are now version ${FORMULA_VERSION}`]),
  ];
}

function measurementReasons({ measurement }: PlanSnapshot, measurements: readonly Measurement[]): string[] {
  const current = measurements.find(({ id }) => id === measurement.id);
  if (current?.supersededById)
    return [`The measurement was superseded: ${current.supersededReason ?? 'no reason given'}`];
  const ofRecord = measurements.find(({ isOfRecord }) => isOfRecord);
  return ofRecord && ofRecord.id !== measurement.id ? ['There is a newer measurement of this eye'] : [];
}

function lensReasons(signed: PlanSnapshot, lenses: readonly Lens[]): string[] {
  const before = signed.lenses.find(({ id }) => id === signed.choice.lensId);
  const now = lenses.find(({ id }) => id === signed.choice.lensId);
  if (!before || !now) return ['The chosen lens model is no longer in the catalogue'];
  return [
    ...(isSame(before.constants, now.constants) ? [] : [`The constants of ${before.name} were changed`]),
    ...(isSame(factsOf(before), factsOf(now)) ? [] : [`The catalogue entry of ${before.name} was changed`]),
    ...(now.isRetired && !before.isRetired ? [`${before.name} was retired`] : []),
  ];
}

const factsOf = ({ name, kind, design, isToric, powerRanges, cylinderStepsD }: Lens) => ({
  name,
  kind,
  design,
  isToric,
  powerRanges,
  cylinderStepsD,
});
