/** What the database holds about the patients that a file names. */
import type { Patient } from '@/shared/contract';
import type { Transaction } from '@/server/db/write-queue';
import { listEyeKeys, type EyeKey } from '@/server/features/eyes/eye-record.service';
import { listKeysOfEyes } from '@/server/features/measurements/measurement.service';
import {
  identityKeyOf,
  listPatientsByBirthDate,
  listPatientsByRecordNumber,
} from '@/server/features/patients/patient-record.service';
import { measurementKeyOf, type StoredRecords } from './check-rows';
import type { RowReading } from './read-row';

export interface LoadedRecords extends StoredRecords {
  eyes: readonly EyeKey[];
}

export async function loadStoredRecords(
  readings: readonly RowReading[],
  transaction?: Transaction,
): Promise<LoadedRecords> {
  const named = [...new Set(readings.flatMap(({ patient }) => patient?.recordNumber ?? []))];
  const patients = await listPatientsByRecordNumber(named, transaction);
  const byRecordNumber = new Map(patients.map((patient) => [patient.recordNumber, patient]));
  const eyes = await listEyeKeys(
    patients.map(({ id }) => id),
    transaction,
  );
  const keys = await listKeysOfEyes(
    eyes.map(({ id }) => id),
    transaction,
  );
  return {
    patients: byRecordNumber,
    eyes,
    measurements: new Map(
      keys.map((key) => [measurementKeyOf(key.patientId, key.side, key.contentHash), key]),
    ),
    namesakes: await findNamesakes(readings, byRecordNumber, transaction),
  };
}

/** Registered people with the name and birth date of somebody whom the file would register anew. */
async function findNamesakes(
  readings: readonly RowReading[],
  known: ReadonlyMap<string, Patient>,
  transaction: Transaction | undefined,
): Promise<Map<string, string>> {
  const unknown = readings.flatMap(({ patient }) =>
    patient && !known.has(patient.recordNumber) ? [patient] : [],
  );
  const birthDates = [...new Set(unknown.map(({ birthDate }) => birthDate))];
  const sameBirthDate = await listPatientsByBirthDate(birthDates, transaction);
  return new Map(sameBirthDate.map((patient) => [identityKeyOf(patient), patient.recordNumber]));
}
