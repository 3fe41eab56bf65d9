/** Measurements: added by hand or from a file, superseded with a reason, never edited. */
import {
  readMeasurement,
  type Eye,
  type Measurement,
  type MeasurementEntryRequest,
  type MeasurementValues,
  type Patient,
} from '@/shared/contract';
import type { Act } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Transaction } from '@/server/db/write-queue';
import { invalidField, ProblemError, takenField } from '@/server/http/problem';
import { contentDigest } from './content-digest';
import {
  addMeasurements,
  findStored,
  listKeysOfEyes,
  listKeysOfImport,
  listStoredOfEyes,
  markSuperseded,
  type MeasurementKey,
  type NewMeasurement,
  type StoredMeasurement,
} from './measurement.repository';

export type { MeasurementKey, NewMeasurement };
export { listKeysOfEyes, listKeysOfImport };

/** All measurements of each eye, newest first, by the eye's id. */
export async function listMeasurements(
  eyes: readonly Eye[],
  transaction?: Transaction,
): Promise<Map<string, Measurement[]>> {
  const stored = await listStoredOfEyes(
    eyes.map(({ id }) => id),
    transaction,
  );
  return new Map(
    eyes.map((eye) => [
      eye.id,
      markOfRecord(
        eye,
        stored.filter(({ eyeId }) => eyeId === eye.id),
      ),
    ]),
  );
}

/** Undefined when there is none, or not of this eye. */
export async function findMeasurement(
  id: string,
  findEye: (eyeId: string) => Promise<Eye | undefined>,
  transaction?: Transaction,
): Promise<Measurement | undefined> {
  const stored = await findStored(id, transaction);
  const eye = stored && (await findEye(stored.eyeId));
  if (!eye) return undefined;
  return (await listMeasurements([eye], transaction)).get(eye.id)?.find((candidate) => candidate.id === id);
}

export const ofRecord = (measurements: readonly Measurement[] | undefined): Measurement | null =>
  measurements?.find(({ isOfRecord }) => isOfRecord) ?? null;

export interface MeasuredEye {
  patient: Patient;
  eye: Eye;
}

/** Reads what was typed, knowing the patient. Pure; throws with every field that is wrong. */
export function readEntry(
  { text }: MeasurementEntryRequest,
  { birthDate, today }: { birthDate: string; today: string },
): MeasurementValues {
  const reading = readMeasurement(text, { today, birthDate });
  if ('values' in reading) return reading.values;
  const fields = reading.problems.map(({ field, message }) => ({
    path: `text.${field}`,
    code: 'custom',
    message,
  }));
  throw new ProblemError('invalid', undefined, { fields });
}

/** Adds a measurement typed in by hand and, when it says so, puts it in the place of another. */
export async function enterMeasurement(
  act: Act,
  { patient, eye }: MeasuredEye,
  entry: Pick<MeasurementEntryRequest, 'supersedesId' | 'reason'> & { values: MeasurementValues },
): Promise<Measurement> {
  const contentHash = contentDigest(entry.values);
  await refuseKnown(act, eye, contentHash);
  const superseded = await findSuperseded(act, eye, entry.supersedesId);
  const id = act.newId();
  await addMeasurements([{ id, eyeId: eye.id, values: entry.values, contentHash }], {
    createdBy: act.actor.id,
    createdAt: act.at,
    transaction: act.transaction,
  });
  const about = { noun: 'measurement', patientId: patient.id, detail: { side: eye.side } };
  await recordAudit(act, { ...about, action: 'measurement.create', nounId: id });
  if (superseded) {
    await markSuperseded(superseded.id, { byId: id, reason: entry.reason }, act.transaction);
    const detail = { ...about.detail, supersededById: id, reason: entry.reason };
    await recordAudit(act, { ...about, action: 'measurement.supersede', nounId: superseded.id, detail });
  }
  const added = (await listMeasurements([eye], act.transaction)).get(eye.id)?.find((one) => one.id === id);
  if (!added) throw new Error('The measurement just added is not there');
  return added;
}

/** Adds the measurements of a file; the import itself is what the audit trail names. */
export async function storeMeasurements(act: Act, measurements: readonly NewMeasurement[]): Promise<void> {
  await addMeasurements(measurements, {
    createdBy: act.actor.id,
    createdAt: act.at,
    transaction: act.transaction,
  });
}

async function refuseKnown(act: Act, eye: Eye, contentHash: string): Promise<void> {
  const known = await listKeysOfEyes([eye.id], act.transaction);
  const same = known.find((key) => key.contentHash === contentHash);
  if (same) {
    throw takenField(
      'text',
      `The same measurement of this eye is stored since ${same.createdAt.slice(0, 10)}`,
    );
  }
}

async function findSuperseded(act: Act, eye: Eye, id: string | null): Promise<StoredMeasurement | undefined> {
  if (id === null) return undefined;
  const stored = await findStored(id, act.transaction);
  if (stored?.eyeId !== eye.id) {
    throw invalidField('supersedesId', 'This measurement is not one of this eye');
  }
  if (stored.supersededById !== null) {
    throw takenField('supersedesId', 'This measurement was superseded meanwhile by another');
  }
  return stored;
}

/** The list is newest first; the first that nothing supersedes is the one of record. */
function markOfRecord(eye: Eye, stored: readonly StoredMeasurement[]): Measurement[] {
  const current = stored.find(({ supersededById }) => supersededById === null);
  return stored.map(({ eyeId: _eyeId, ...measurement }) => ({
    ...measurement,
    patientId: eye.patientId,
    side: eye.side,
    isOfRecord: measurement.id === current?.id,
  }));
}
