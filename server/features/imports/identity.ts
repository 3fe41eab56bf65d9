/** One record number, one person: finds rows that disagree about who that is. Pure. */
import type { PatientInput } from '@/shared/contract';
import type { RowReading } from './read-row';

export type IdentityField = 'familyName' | 'givenName' | 'birthDate' | 'sex';

interface IdentityInRow {
  row: number;
  patient: PatientInput;
}

export interface IdentityConflict {
  field: IdentityField;
  rows: readonly [IdentityInRow, IdentityInRow];
}
/** By record number. Nobody can say which of the rows is right, so all of them are refused. */
export type IdentityConflicts = ReadonlyMap<string, IdentityConflict>;

const FIELDS: readonly IdentityField[] = ['familyName', 'givenName', 'birthDate', 'sex'];

/** The first field in which the two differ; capitals and the encoding of accents do not count. */
export function identityDifference(a: PatientInput, b: PatientInput): IdentityField | undefined {
  return FIELDS.find((field) => a[field] !== b[field] && comparable(a[field]) !== comparable(b[field]));
}

export function findConflicts(readings: readonly RowReading[]): IdentityConflicts {
  const first = new Map<string, IdentityInRow>();
  const conflicts = new Map<string, IdentityConflict>();
  for (const { row, patient } of readings) {
    if (!patient) continue;
    const earlier = first.get(patient.recordNumber);
    if (!earlier) first.set(patient.recordNumber, { row, patient });
    else if (!conflicts.has(patient.recordNumber)) {
      const field = identityDifference(earlier.patient, patient);
      if (field) conflicts.set(patient.recordNumber, { field, rows: [earlier, { row, patient }] });
    }
  }
  return conflicts;
}

function comparable(text: string): string {
  return text.normalize('NFC').toLowerCase().replace(/\s+/g, ' ');
}
