/** One row of a biometry file as patient, side and measurement, or everything that is wrong with it. Pure. */
import {
  formatPatientName,
  MEASUREMENT_TEXT_COLUMNS,
  MEASUREMENT_TEXT_FIELDS,
  readMeasurement,
  readPatient,
  readSide,
  shownText,
  TEMPLATE_COLUMNS,
  type MeasurementText,
  type MeasurementValues,
  type PatientInput,
  type PatientReading,
  type PatientText,
  type RowProblem,
  type Side,
  type TemplateColumn,
} from '@/shared/contract';
import { withoutFormulaEscape } from '@/server/csv/formula-text';
import type { CsvRecord } from '@/server/csv/records';
import { contentDigest } from '@/server/features/measurements/content-digest';
import type { BiometryHeader } from './read-file';

export interface AcceptedRow {
  patient: PatientInput;
  side: Side;
  values: MeasurementValues;
  contentHash: string;
}

export interface RowReading {
  /** Line of the record in the file. */
  row: number;
  fields: readonly string[];
  recordNumber: string;
  patientName: string;
  side: string;
  problems: RowProblem[];
  /** The identity that the row states, where it can be read: rows of one record number must agree on it. */
  patient: PatientInput | undefined;
  accepted: AcceptedRow | undefined;
}

export interface RowReader {
  header: BiometryHeader;
  /** ISO date. */
  today: string;
}

const PATIENT_COLUMNS = {
  recordNumber: 'record_number',
  familyName: 'family_name',
  givenName: 'given_name',
  birthDate: 'birth_date',
  sex: 'sex',
} as const satisfies Record<keyof PatientInput, TemplateColumn>;
const PATIENT_FIELDS = Object.keys(PATIENT_COLUMNS) as (keyof PatientInput)[];

export function readRow({ header, today }: RowReader, { line, fields }: CsvRecord): RowReading {
  const valueAt = (column: TemplateColumn): string =>
    withoutFormulaEscape(fields[header.places[column]] ?? '');
  const patientText = {} as PatientText;
  for (const field of PATIENT_FIELDS) patientText[field] = valueAt(PATIENT_COLUMNS[field]);
  const reading: RowReading = {
    row: line,
    fields,
    ...shownIdentity(patientText, valueAt('side')),
    problems: [],
    patient: undefined,
    accepted: undefined,
  };
  if (fields.length !== header.width) {
    reading.problems.push(raggedRow(fields.length, header));
    return reading;
  }
  const refuse = (column: TemplateColumn, message: string): void => {
    reading.problems.push({ column, value: shownText(valueAt(column).trim()), message });
  };
  const patient = readPatient(patientText, { today });
  reading.patient = acceptedPatient(patient, refuse);
  const side = readSide(valueAt('side'));
  if ('message' in side) refuse('side', side.message);
  const values = readValues(valueAt, { today, birthDate: reading.patient?.birthDate }, refuse);
  if (reading.problems.length > 0 || !reading.patient || 'message' in side || !values) return reading;
  reading.accepted = {
    patient: reading.patient,
    side: side.side,
    values,
    contentHash: contentDigest(values),
  };
  return reading;
}

/** The record as it stood in the file, by column of the template. */
export function rawRecord({ places }: BiometryHeader, fields: readonly string[]): Record<string, string> {
  return Object.fromEntries(TEMPLATE_COLUMNS.map((column) => [column, fields[places[column]] ?? '']));
}

type Refuse = (column: TemplateColumn, message: string) => void;

function acceptedPatient(reading: PatientReading, refuse: Refuse): PatientInput | undefined {
  if ('values' in reading) return reading.values;
  for (const { field, message } of reading.problems) refuse(PATIENT_COLUMNS[field], message);
  return undefined;
}

function readValues(
  valueAt: (column: TemplateColumn) => string,
  options: { today: string; birthDate?: string },
  refuse: Refuse,
): MeasurementValues | undefined {
  const text: MeasurementText = {};
  for (const field of MEASUREMENT_TEXT_FIELDS) text[field] = valueAt(MEASUREMENT_TEXT_COLUMNS[field]);
  const reading = readMeasurement(text, options);
  if ('values' in reading) return reading.values;
  for (const { field, message } of reading.problems) refuse(MEASUREMENT_TEXT_COLUMNS[field], message);
  return undefined;
}

function raggedRow(count: number, { width, delimiter }: BiometryHeader): RowProblem {
  const hint =
    count > width && delimiter === ','
      ? ': in a comma-separated file a number with a decimal comma stands in quotes'
      : '';
  return {
    column: '',
    value: '',
    message: `The row has ${count} fields and the header ${width}${hint}`,
  };
}

function shownIdentity({ recordNumber, familyName, givenName }: PatientText, side: string) {
  const name = formatPatientName({ familyName: familyName.trim(), givenName: givenName.trim() });
  return {
    recordNumber: shownText(recordNumber.trim()),
    patientName: shownText(name),
    side: shownText(side.trim().toLowerCase()),
  };
}
