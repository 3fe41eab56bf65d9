/** Everything about one eye, and what is done at it: history, measurements, settlements. */
import {
  localDateOf,
  type EyeDesk,
  type Flag,
  type Measurement,
  type MeasurementEntryRequest,
  type SettlementInput,
  type Side,
} from '@/shared/contract';
import type { Act } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import { enterMeasurement, ofRecord, readEntry } from '@/server/features/measurements/measurement.service';
import { getPatient } from '@/server/features/patients/patient-record.service';
import { listOfEye } from '@/server/features/plans/plan-list.service';
import { ProblemError, takenField } from '@/server/http/problem';
import { getEyes } from './eye-record.service';
import { findStandings, type EyeStanding } from './eye-standing.service';
import { addSettlement } from './settlement.repository';

export interface EyeAddress {
  patientId: string;
  side: Side;
}

export async function viewEyeDesk(act: Act, { patientId, side }: EyeAddress): Promise<EyeDesk> {
  const patient = await getPatient(patientId, act.transaction);
  const { standing, fellow } = await findStanding(act, { patientId, side });
  const { eye, measurements, flags, stage, waitsFor } = standing;
  await recordAudit(act, {
    action: 'eye.view',
    noun: 'eye',
    nounId: eye.id,
    patientId,
    version: eye.version,
    detail: { side },
  });
  return {
    patient,
    eye,
    fellowEye: fellow.eye,
    measurements,
    fellowMeasurement: ofRecord(fellow.measurements),
    flags,
    plans: await listOfEye(act, eye.id),
    stage,
    waitsFor,
  };
}

export async function addMeasurement(
  act: Act,
  { patientId, side }: EyeAddress,
  entry: MeasurementEntryRequest,
): Promise<Measurement> {
  const patient = await getPatient(patientId, act.transaction);
  const { eye } = await getEyes(patientId, side, act.transaction);
  const values = readEntry(entry, { birthDate: patient.birthDate, today: todayOf(act) });
  const { supersedesId, reason } = entry;
  return enterMeasurement(act, { patient, eye }, { values, supersedesId, reason });
}

/** Settles a stop or weigh that stands at this moment. The reason and the name stay for good. */
export async function settleFlag(
  act: Act,
  address: EyeAddress,
  { ruleId, measurementId, reason }: SettlementInput,
): Promise<Flag> {
  const { standing } = await findStanding(act, address);
  const current = ofRecord(standing.measurements);
  const flag = standing.flags.find((raised) => raised.ruleId === ruleId);
  if (!flag || measurementId !== (current?.id ?? null)) {
    throw new ProblemError('conflict', 'This flag does not stand for the eye as it is measured now');
  }
  if (flag.severity === 'note') throw new ProblemError('conflict', 'A note needs no settlement');
  if (flag.severity === 'stop' && !flag.canBeSettled)
    throw new ProblemError('conflict', 'No reason makes up for this stop: what it rests on has to change');
  if (flag.settlement) throw takenField('ruleId', `Settled already by ${flag.settlement.by}`);
  const { eye } = standing;
  const settled = { settledBy: act.actor.id, settledAt: act.at };
  await addSettlement(
    { id: act.newId(), eyeId: eye.id, measurementId, ruleId, reason, ...settled },
    act.transaction,
  );
  await recordAudit(act, {
    action: 'flag.settle',
    noun: 'eye',
    nounId: eye.id,
    patientId: address.patientId,
    detail: { side: eye.side, ruleId, severity: flag.severity, measurementId, reason },
  });
  return { ...flag, settlement: { by: act.actor.displayName, at: act.at, reason } };
}

async function findStanding(
  act: Act,
  { patientId, side }: EyeAddress,
): Promise<{ standing: EyeStanding; fellow: EyeStanding }> {
  const { eye, fellowEye } = await getEyes(patientId, side, act.transaction);
  const request = { eyes: [eye, fellowEye], today: todayOf(act) };
  const [standing, fellow] = await findStandings(request, act.transaction);
  if (!standing || !fellow) throw new ProblemError('not-found');
  return { standing, fellow };
}

const todayOf = (act: Act): string => localDateOf(new Date(act.at));
