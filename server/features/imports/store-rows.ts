/** Stores the rows that a file adds, all in the transaction of the act: patients, their eyes, measurements. */
import type { Act } from '@/server/act';
import { storeMeasurements, type NewMeasurement } from '@/server/features/measurements/measurement.service';
import { registerPatients, type NewPatient } from '@/server/features/patients/patient-record.service';
import type { EyeKey } from '@/server/features/eyes/eye-record.service';
import { breathe } from './breathe';
import type { JudgedRows } from './check-file';
import type { RowVerdict } from './check-rows';
import type { BiometryHeader } from './read-file';
import type { OnProgress } from './read-rows';
import { rawRecord } from './read-row';

export interface RowsToStore extends JudgedRows {
  importId: string;
  header: BiometryHeader;
  /** New patients are marked as invented. */
  isDemo: boolean;
  onProgress: OnProgress;
}

/** The verdicts again, now knowing where each created row went. */
export async function storeRows(act: Act, rows: RowsToStore): Promise<RowVerdict[]> {
  const { verdicts, stored, importId } = rows;
  const newPatients = patientsToRegister(act, rows);
  const newEyes = await registerPatients(act, newPatients, { importId });
  const places = new Places([...stored.eyes, ...newEyes], [...stored.patients.values(), ...newPatients]);
  const created = verdicts.filter(({ outcome }) => outcome === 'created');
  const placed = new Map<RowVerdict, { patientId: string; measurementId: string }>();
  for (let from = 0; from < created.length; from += ROWS_PER_TURN) {
    const part = created.slice(from, from + ROWS_PER_TURN).map((verdict) => {
      const { patientId, eyeId } = places.of(verdict);
      const measurement = toMeasurement(verdict, { id: act.newId(), eyeId, rows });
      placed.set(verdict, { patientId, measurementId: measurement.id });
      return measurement;
    });
    await storeMeasurements(act, part);
    rows.onProgress({ done: from + part.length, total: created.length });
    await breathe();
  }
  return verdicts.map((verdict) => ({ ...verdict, ...placed.get(verdict) }));
}

function patientsToRegister(act: Act, { verdicts, isDemo }: RowsToStore): NewPatient[] {
  return verdicts.flatMap(({ isNewPatient, reading }) =>
    isNewPatient && reading.patient ? [{ ...reading.patient, id: act.newId(), isDemo }] : [],
  );
}

/** Which patient and which eye a row belongs to. */
class Places {
  private readonly eyeIds: ReadonlyMap<string, string>;
  private readonly patientIds: ReadonlyMap<string, string>;

  constructor(eyes: readonly EyeKey[], patients: readonly { id: string; recordNumber: string }[]) {
    this.eyeIds = new Map(eyes.map(({ id, patientId, side }) => [`${patientId}/${side}`, id]));
    this.patientIds = new Map(patients.map(({ id, recordNumber }) => [recordNumber, id]));
  }

  of({ reading }: RowVerdict): { patientId: string; eyeId: string } {
    const patientId = this.patientIds.get(reading.patient?.recordNumber ?? '');
    const eyeId = this.eyeIds.get(`${patientId}/${reading.accepted?.side}`);
    if (patientId === undefined || eyeId === undefined) throw new Error(`Row ${reading.row} has no eye`);
    return { patientId, eyeId };
  }
}

function toMeasurement(
  { reading }: RowVerdict,
  { id, eyeId, rows }: { id: string; eyeId: string; rows: RowsToStore },
): NewMeasurement {
  if (!reading.accepted) throw new Error(`Row ${reading.row} was not accepted`);
  const { values, contentHash } = reading.accepted;
  const raw = rawRecord(rows.header, reading.fields);
  return { id, eyeId, values, contentHash, source: { importId: rows.importId, row: reading.row, raw } };
}

const ROWS_PER_TURN = 1000;
