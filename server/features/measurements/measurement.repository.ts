import type { Transaction } from 'sequelize';
import type { Measurement, MeasurementValues, Provenance, Side } from '@/shared/contract';
import { insertRows } from '@/server/db/insert-rows';
import { MeasurementModel } from '@/server/db/models/measurement';
import { asList, columnList, IN_FIRST, selectRows } from '@/server/db/select-rows';

export interface NewMeasurement {
  id: string;
  eyeId: string;
  values: MeasurementValues;
  contentHash: string;
  /** Where it came from; absent for one typed in by hand. */
  source?: { importId: string; row: number; raw: Record<string, string> };
}

/** A measurement of an eye, before it is known which patient and side that eye is. */
export type StoredMeasurement = Omit<Measurement, 'patientId' | 'side' | 'isOfRecord'> & { eyeId: string };

/** What an import must know of a measurement that is there already. */
export interface MeasurementKey {
  id: string;
  patientId: string;
  side: Side;
  contentHash: string;
  createdAt: string;
  /** Row of the file that it came from. */
  importRow: number | null;
}

export const VALUE_ATTRIBUTES = [
  'measuredAt',
  'method',
  'device',
  'axialLengthMm',
  'axialLengthSdMm',
  'flatRadiusMm',
  'steepRadiusMm',
  'flatKD',
  'steepKD',
  'keratometricIndex',
  'flatAxisDeg',
  'steepAxisDeg',
  'acdMm',
  'acdFrom',
  'lensThicknessMm',
  'cornealThicknessUm',
  'whiteToWhiteMm',
  'pupilMm',
  'operator',
  'remarks',
] as const satisfies readonly (keyof MeasurementValues)[];

const ATTRIBUTES = [
  'id',
  'eyeId',
  'contentHash',
  'importId',
  'importRow',
  'raw',
  'createdBy',
  'createdAt',
  ...VALUE_ATTRIBUTES,
] as const;

export interface Authorship {
  createdBy: string;
  createdAt: string;
  transaction: Transaction;
}

export async function addMeasurements(
  measurements: readonly NewMeasurement[],
  { createdBy, createdAt, transaction }: Authorship,
): Promise<void> {
  const rows = measurements.map(({ id, eyeId, values, contentHash, source }) => [
    id,
    eyeId,
    contentHash,
    source?.importId ?? null,
    source?.row ?? null,
    source?.raw ?? null,
    createdBy,
    createdAt,
    ...VALUE_ATTRIBUTES.map((attribute) => values[attribute]),
  ]);
  await insertRows(MeasurementModel, { attributes: ATTRIBUTES, rows, transaction });
}

export async function findStored(
  id: string,
  transaction?: Transaction,
): Promise<StoredMeasurement | undefined> {
  const [row] = await selectMeasurements('m.id = $1', id, transaction);
  return row && toStored(row);
}

/** Newest first: by the day of the measurement, then by when it came in. */
export async function listStoredOfEyes(
  eyeIds: readonly string[],
  transaction?: Transaction,
): Promise<StoredMeasurement[]> {
  return (await selectMeasurements(`m.eye_id ${IN_FIRST}`, asList(eyeIds), transaction)).map(toStored);
}

export async function listKeysOfEyes(
  eyeIds: readonly string[],
  transaction?: Transaction,
): Promise<MeasurementKey[]> {
  return listKeys(`m.eye_id ${IN_FIRST}`, asList(eyeIds), transaction);
}

export async function listKeysOfImport(
  importId: string,
  transaction?: Transaction,
): Promise<MeasurementKey[]> {
  return listKeys('m.import_id = $1', importId, transaction);
}

async function listKeys(
  condition: string,
  value: string,
  transaction: Transaction | undefined,
): Promise<MeasurementKey[]> {
  const sql = `SELECT m.id, e.patient_id AS patientId, e.side, m.content_hash AS contentHash,
       m.created_at AS createdAt, m.import_row AS importRow
     FROM measurements m JOIN eyes e ON e.id = m.eye_id WHERE ${condition}`;
  return selectRows<MeasurementKey>(MeasurementModel, { sql, bind: [value], transaction });
}

export async function markSuperseded(
  id: string,
  { byId, reason }: { byId: string; reason: string },
  transaction: Transaction,
): Promise<void> {
  await MeasurementModel.update(
    { supersededById: byId, supersededReason: reason },
    { where: { id }, transaction },
  );
}

const STORED_ATTRIBUTES = [
  'id',
  'eyeId',
  'importId',
  'importRow',
  'raw',
  'createdAt',
  'supersededById',
  'supersededReason',
  ...VALUE_ATTRIBUTES,
] as const;

/** As the columns hold it, with the name of its author and of its file. */
type MeasurementRow = Omit<Pick<MeasurementModel, (typeof STORED_ATTRIBUTES)[number]>, 'raw'> & {
  raw: string | null;
  author: string;
  fileName: string | null;
};

function selectMeasurements(
  condition: string,
  value: string,
  transaction: Transaction | undefined,
): Promise<MeasurementRow[]> {
  const sql = `SELECT ${columnList(MeasurementModel, STORED_ATTRIBUTES, 'm')}, a.display_name AS author,
       i.file_name AS fileName
     FROM measurements m JOIN accounts a ON a.id = m.created_by LEFT JOIN imports i ON i.id = m.import_id
     WHERE ${condition}
     ORDER BY m.measured_at DESC, m.created_at DESC, m.import_row DESC, m.id DESC`;
  return selectRows<MeasurementRow>(MeasurementModel, { sql, bind: [value], transaction });
}

function toStored(row: MeasurementRow): StoredMeasurement {
  return {
    id: row.id,
    eyeId: row.eyeId,
    values: valuesOf(row),
    provenance: provenanceOf(row),
    createdAt: row.createdAt,
    createdBy: row.author,
    supersededById: row.supersededById,
    supersededReason: row.supersededReason,
  };
}

function valuesOf(row: MeasurementRow): MeasurementValues {
  return Object.fromEntries(
    VALUE_ATTRIBUTES.map((attribute) => [attribute, row[attribute]]),
  ) as MeasurementValues;
}

function provenanceOf({ importId, importRow, raw, author, fileName }: MeasurementRow): Provenance {
  if (importId === null || importRow === null) return { kind: 'manual', enteredBy: author };
  const record = raw === null ? {} : (JSON.parse(raw) as Record<string, string>);
  return { kind: 'file', importId, fileName: fileName ?? '', row: importRow, raw: record };
}
