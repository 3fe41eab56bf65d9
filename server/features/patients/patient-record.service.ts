/** Patients as other features use them: finding, and registering many at once. */
import type { Patient } from '@/shared/contract';
import type { AnyAct } from '@/server/act';
import { recordAudits } from '@/server/audit/bulk-writer';
import type { Transaction } from '@/server/db/write-queue';
import { createEyes, type EyeKey } from '@/server/features/eyes/eye-record.service';
import { ProblemError } from '@/server/http/problem';
import {
  addPatients,
  findPatient,
  listPatientsAfter,
  listPatientsByBirthDate,
  listPatientsById,
  listPatientsByRecordNumber,
  type NewPatient,
} from './patient.repository';
import { identityKeyOf, searchTerms } from './search';

export type { NewPatient };
export { findPatient, identityKeyOf, listPatientsByBirthDate, listPatientsById, listPatientsByRecordNumber };

export async function getPatient(id: string, transaction?: Transaction): Promise<Patient> {
  const patient = await findPatient(id, transaction);
  if (!patient) throw new ProblemError('not-found');
  return patient;
}

/** Adds patients with their eyes and one audit entry each. Record numbers must be free. */
export async function registerPatients(
  act: AnyAct,
  patients: readonly NewPatient[],
  detail: Record<string, unknown> = {},
): Promise<EyeKey[]> {
  await addPatients(patients, act.at, act.transaction);
  const eyes = await createEyes(
    act,
    patients.map(({ id }) => id),
  );
  await recordAudits(
    act,
    patients.map(({ id, recordNumber }) => ({
      action: 'patient.create',
      noun: 'patient',
      nounId: id,
      patientId: id,
      version: 0,
      detail: { recordNumber, ...detail },
    })),
  );
  return eyes;
}

/** Most patients that a search in another list may mean; more than that is no search. */
const SEARCH_LIMIT = 500;

/** Ids of the patients whom a search means: by name, record number or birth date. */
export async function findPatientIds(search: string): Promise<string[]> {
  const patients = await listPatientsAfter(searchTerms(search), undefined, SEARCH_LIMIT);
  return patients.map(({ id }) => id);
}
