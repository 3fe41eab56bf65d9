/** What is known of an eye and the flags that it raises, each with its settlement. */
import type { Eye, Flag, Measurement, Patient } from '@/shared/contract';
import { checkMeasurements } from '@/shared/clinical/measurement-checks';
import type { Transaction } from '@/server/db/write-queue';
import { listMeasurements, ofRecord } from '@/server/features/measurements/measurement.service';
import { listPatientsById } from '@/server/features/patients/patient-record.service';
import { listSettlements, type Settlement } from './settlement.repository';

export interface EyeChecks {
  patient: Patient;
  eye: Eye;
  fellowEye: Eye | null;
  /** Newest first. */
  measurements: Measurement[];
  /** The one of record of the other eye. */
  fellowMeasurement: Measurement | null;
  settlements: Settlement[];
}

/** For both eyes of each patient: flags compare the two. */
export async function findChecks(eyes: readonly Eye[], transaction?: Transaction): Promise<EyeChecks[]> {
  const [measurements, settlements, patients] = await Promise.all([
    listMeasurements(eyes, transaction),
    listSettlements(
      eyes.map(({ id }) => id),
      transaction,
    ),
    listPatientsById([...new Set(eyes.map(({ patientId }) => patientId))], transaction),
  ]);
  const people = new Map(patients.map((patient) => [patient.id, patient]));
  return eyes.map((eye) => {
    const patient = people.get(eye.patientId);
    if (!patient) throw new Error('An eye without a patient');
    const fellowEye =
      eyes.find(({ patientId, side }) => patientId === eye.patientId && side !== eye.side) ?? null;
    return {
      patient,
      eye,
      fellowEye,
      measurements: measurements.get(eye.id) ?? [],
      fellowMeasurement: fellowEye && ofRecord(measurements.get(fellowEye.id)),
      settlements: settlements.filter(({ eyeId }) => eyeId === eye.id),
    };
  });
}

/** Flags of one of the eye's measurements; none without a measurement. `today` is an ISO date. */
export function flagsOf(checks: EyeChecks, measurement: Measurement | null, today: string): Flag[] {
  if (!measurement) return [];
  const raised = checkMeasurements({ ...checks, measurement, today });
  return raised.map((flag) => ({ ...flag, settlement: settlementOf(flag, measurement, checks.settlements) }));
}

/** A settlement counts for the measurement that it was given for, and no other. */
function settlementOf(
  { ruleId }: Pick<Flag, 'ruleId'>,
  measurement: Measurement,
  settlements: readonly Settlement[],
): Flag['settlement'] {
  const found = settlements.find((one) => one.ruleId === ruleId && one.measurementId === measurement.id);
  return found ? { by: found.by, at: found.at, reason: found.reason } : null;
}
