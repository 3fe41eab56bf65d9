/**
 * The past of the demonstration as acts of its people, each at its own moment. They run in order of time, in
 * one transaction, so that records, signatures and audit trail tell the same story.
 */
import type { Patient, Role } from '@/shared/contract';
import type { Act } from '@/server/act';
import { listPatientsByRecordNumber } from '@/server/features/patients/patient-record.service';

export interface SeedStep {
  /** ISO moment. */
  at: string;
  /** Whose act it is: the demonstration has one person for each role. */
  by: Role;
  perform(act: Act): Promise<void>;
}

export async function getPatientByRecord(act: Act, recordNumber: string): Promise<Patient> {
  const [patient] = await listPatientsByRecordNumber([recordNumber], act.transaction);
  if (!patient) throw new Error(`${recordNumber} is not registered`);
  return patient;
}
