/** What the demonstration knows of its patients besides biometry: histories, and people not measured yet. */
import type { EyeHistory, PatientInput } from '@/shared/contract';
import type { Act } from '@/server/act';
import { getEyes, recordHistory } from '@/server/features/eyes/eye-record.service';
import { listPatientsByRecordNumber } from '@/server/features/patients/patient-record.service';
import { registerPatient } from '@/server/features/patients/patient.service';
import { demoCohort } from './demo-cohort';

const UNREMARKABLE: EyeHistory = {
  cornealSurgery: 'no',
  cornealSurgeryKind: null,
  lensStatus: 'phakic',
  vitreousStatus: 'vitreous',
  remarks: '',
};

export async function seedHistories(act: Act): Promise<void> {
  const cohort = demoCohort();
  const patients = await listPatientsByRecordNumber(
    cohort.map(({ person }) => person.record),
    act.transaction,
  );
  const ids = new Map(patients.map(({ recordNumber, id }) => [recordNumber, id]));
  for (const { person, history } of cohort) {
    const patientId = ids.get(person.record);
    if (!patientId) throw new Error(`${person.record} was not imported`);
    for (const side of ['right', 'left'] as const) {
      const { eye } = await getEyes(patientId, side, act.transaction);
      await recordHistory(act, {
        patientId,
        side,
        ifMatch: eye.version,
        history: { ...UNREMARKABLE, ...history?.[side] },
      });
    }
  }
}

const NOT_MEASURED_YET: readonly PatientInput[] = [
  {
    recordNumber: 'D-0401',
    familyName: 'Brinesby',
    givenName: 'Clara',
    birthDate: '1952-06-06',
    sex: 'female',
  },
  {
    recordNumber: 'D-0402',
    familyName: 'Shoalwick',
    givenName: 'Ernst',
    birthDate: '1948-11-23',
    sex: 'male',
  },
];

export async function seedRegistrations(act: Act): Promise<void> {
  for (const patient of NOT_MEASURED_YET) await registerPatient(act, patient, { isDemo: true });
}
