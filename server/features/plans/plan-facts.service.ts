/** What the plans of some eyes have to be compared with: patients, eyes, measurements, flags, catalogue. */
import {
  localDateOf,
  type Eye,
  type Flag,
  type Lens,
  type Measurement,
  type Patient,
} from '@/shared/contract';
import type { Transaction } from '@/server/db/write-queue';
import { findEyeById, getEyes, listEyesOfPatients } from '@/server/features/eyes/eye-record.service';
import { findStandings } from '@/server/features/eyes/eye-standing.service';
import { listLenses } from '@/server/features/lenses/lens.service';
import { getPatient, listPatientsById } from '@/server/features/patients/patient-record.service';
import { ProblemError } from '@/server/http/problem';

export interface EyeFacts {
  patient: Patient;
  eye: Eye;
  /** Newest first. */
  measurements: Measurement[];
  flags: Flag[];
  lenses: Lens[];
}

/** Everything about one eye that a plan needs. `at` is the ISO moment that counts as now. */
export async function factsOfEye(eyeId: string, at: string, transaction?: Transaction): Promise<EyeFacts> {
  const found = await findEyeById(eyeId, transaction);
  if (!found) throw new ProblemError('not-found');
  const { eye, fellowEye } = await getEyes(found.patientId, found.side, transaction);
  const request = { eyes: [eye, fellowEye], today: localDateOf(new Date(at)) };
  const [patient, [standing], lenses] = await Promise.all([
    getPatient(eye.patientId, transaction),
    findStandings(request, transaction),
    listLenses(transaction),
  ]);
  return { patient, eye, measurements: standing?.measurements ?? [], flags: standing?.flags ?? [], lenses };
}

/** The same for a page of plans, by the eye's id, in a handful of reads. */
export async function factsOfEyes(eyeIds: readonly string[], at: string): Promise<Map<string, EyeFacts>> {
  const wanted = await Promise.all(eyeIds.map((id) => findEyeById(id)));
  const patientIds = [...new Set(wanted.flatMap((eye) => (eye ? [eye.patientId] : [])))];
  const [patients, eyes, lenses] = await Promise.all([
    listPatientsById(patientIds),
    listEyesOfPatients(patientIds),
    listLenses(),
  ]);
  const standings = await findStandings({ eyes, today: localDateOf(new Date(at)) });
  const entries = standings.flatMap(({ eye, measurements, flags }) => {
    const patient = patients.find(({ id }) => id === eye.patientId);
    return patient ? [[eye.id, { patient, eye, measurements, flags, lenses }] as const] : [];
  });
  return new Map(entries);
}
