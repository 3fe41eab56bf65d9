/**
 * What becomes of each row: created, already there, or refused; judged against what is stored and against the
 * other rows of the file. Pure: the stored data are handed in.
 */
import {
  formatPatientName,
  type ImportRow,
  type Patient,
  type PatientInput,
  type RowOutcome,
  type RowProblem,
  type TemplateColumn,
} from '@/shared/contract';
import type { MeasurementKey } from '@/server/features/measurements/measurement.service';
import { identityKeyOf } from '@/server/features/patients/search';
import { findConflicts, identityDifference, type IdentityConflicts } from './identity';
import type { AcceptedRow, RowReading } from './read-row';

/** What the database holds about the patients that the file names. */
export interface StoredRecords {
  patients: ReadonlyMap<string, Patient>;
  /** By patient id, side and digest. */
  measurements: ReadonlyMap<string, MeasurementKey>;
  /** Record number of somebody with the same name and birth date, by identity key. */
  namesakes: ReadonlyMap<string, string>;
}

export const measurementKeyOf = (patientId: string, side: string, contentHash: string): string =>
  `${patientId}/${side}/${contentHash}`;

export interface RowVerdict {
  reading: RowReading;
  outcome: RowOutcome;
  summary: string;
  problems: RowProblem[];
  /** True for the first row of a patient who is not registered yet. */
  isNewPatient: boolean;
  /** The registered patient, and the measurement that is there already. */
  patientId: string | null;
  measurementId: string | null;
}

export interface RowJudge {
  judge(reading: RowReading): RowVerdict;
}

/** Judges rows in the order of the file; `readings` are all of them. */
export function createJudge(readings: readonly RowReading[], stored: StoredRecords): RowJudge {
  const conflicts = findConflicts(readings);
  const seen: SeenRows = { measurements: new Map(), patients: new Map() };
  return {
    judge: (reading) => judgeRow(reading, { stored, conflicts, seen }),
  };
}

/** Earlier rows of the file. */
interface SeenRows {
  /** Row that first brought a measurement, by record number, side and digest. */
  measurements: Map<string, number>;
  /** Row that first brought a new patient, by record number. */
  patients: Map<string, number>;
}

interface Evidence {
  stored: StoredRecords;
  conflicts: IdentityConflicts;
  seen: SeenRows;
}

function judgeRow(reading: RowReading, evidence: Evidence): RowVerdict {
  const { accepted } = reading;
  const known = evidence.stored.patients.get(reading.patient?.recordNumber ?? '');
  const problems = [...reading.problems, ...identityProblems(reading.patient, known, evidence.conflicts)];
  if (!accepted || problems.length > 0) {
    const summary = 'not stored';
    return verdict(reading, { outcome: 'refused', summary, problems, patientId: known?.id });
  }
  return judgeMeasurement(reading, accepted, { ...evidence, known });
}

function judgeMeasurement(
  reading: RowReading,
  { patient, side, contentHash }: AcceptedRow,
  { stored, seen, known }: Evidence & { known: Patient | undefined },
): RowVerdict {
  const inFile = measurementKeyOf(patient.recordNumber, side, contentHash);
  const earlierRow = seen.measurements.get(inFile);
  if (earlierRow !== undefined) {
    return verdict(reading, {
      outcome: 'already-there',
      summary: `the same measurement stands in row ${earlierRow}`,
      patientId: known?.id,
    });
  }
  seen.measurements.set(inFile, reading.row);
  const same = known && stored.measurements.get(measurementKeyOf(known.id, side, contentHash));
  if (same) {
    return verdict(reading, {
      outcome: 'already-there',
      summary: `the same measurement is stored since ${same.createdAt.slice(0, 10)}`,
      patientId: known.id,
      measurementId: same.id,
    });
  }
  const summary = `${patientSummary(patient, known, { stored, seen })}, ${side} eye`;
  const isNewPatient = !known && !seen.patients.has(patient.recordNumber);
  if (isNewPatient) seen.patients.set(patient.recordNumber, reading.row);
  return verdict(reading, { outcome: 'created', summary, isNewPatient, patientId: known?.id });
}

function patientSummary(
  patient: PatientInput,
  known: Patient | undefined,
  { stored, seen }: Pick<Evidence, 'stored' | 'seen'>,
): string {
  if (known) return 'known patient';
  const firstRow = seen.patients.get(patient.recordNumber);
  if (firstRow !== undefined) return `new patient of row ${firstRow}`;
  const namesake = stored.namesakes.get(identityKeyOf(patient));
  return namesake === undefined
    ? 'new patient'
    : `new patient (record ${namesake} has the same name and birth date: is it the same person?)`;
}

const COLUMNS = {
  familyName: 'family_name',
  givenName: 'given_name',
  birthDate: 'birth_date',
  sex: 'sex',
} as const satisfies Partial<Record<keyof PatientInput, TemplateColumn>>;

function identityProblems(
  patient: PatientInput | undefined,
  known: Patient | undefined,
  conflicts: IdentityConflicts,
): RowProblem[] {
  if (!patient) return [];
  const problems: RowProblem[] = [];
  const { recordNumber } = patient;
  const field = known && identityDifference(patient, known);
  if (field) {
    problems.push({
      column: COLUMNS[field],
      value: patient[field],
      message: `Record number ${recordNumber} belongs to ${described(known)}; this row says ${described(patient)}`,
    });
  }
  const conflict = conflicts.get(recordNumber);
  if (conflict) {
    const [first, second] = conflict.rows;
    problems.push({
      column: COLUMNS[conflict.field],
      value: patient[conflict.field],
      message: `Record number ${recordNumber} stands for two people in this file: ${described(first.patient)} in row ${first.row}, ${described(second.patient)} in row ${second.row}`,
    });
  }
  return problems;
}

function described(patient: PatientInput): string {
  return `${formatPatientName(patient)}, born ${patient.birthDate}, ${patient.sex}`;
}

function verdict(
  reading: RowReading,
  given: {
    outcome: RowOutcome;
    summary: string;
    problems?: RowProblem[];
    isNewPatient?: boolean;
    patientId?: string;
    measurementId?: string;
  },
): RowVerdict {
  return {
    reading,
    outcome: given.outcome,
    summary: given.summary,
    problems: given.problems ?? [],
    isNewPatient: given.isNewPatient ?? false,
    patientId: given.patientId ?? null,
    measurementId: given.measurementId ?? null,
  };
}

/** As the list of rows shows it. */
export function toImportRow({ reading, ...given }: RowVerdict): ImportRow {
  const { row, recordNumber, patientName, side } = reading;
  const { outcome, summary, problems, patientId, measurementId } = given;
  return { row, outcome, recordNumber, patientName, side, summary, problems, patientId, measurementId };
}
