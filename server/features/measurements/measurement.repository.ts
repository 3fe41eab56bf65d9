import { QueryTypes, type Transaction } from 'sequelize';
import type { Measurement, MeasurementValues, Provenance, Side } from '@/shared/contract';
import { insertRows } from '@/server/db/insert-rows';
import { AccountModel } from '@/server/db/models/account';
import { ImportModel } from '@/server/db/models/import';
import { MeasurementModel } from '@/server/db/models/measurement';

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
  const row = await MeasurementModel.findByPk(id, { transaction });
  return row ? (await toStored([row], transaction))[0] : undefined;
}

/** Newest first: by the day of the measurement, then by when it came in. */
export async function listStoredOfEyes(
  eyeIds: readonly string[],
  transaction?: Transaction,
): Promise<StoredMeasurement[]> {
  const rows = await MeasurementModel.findAll({
    where: { eyeId: [...eyeIds] },
    order: [
      ['measuredAt', 'DESC'],
      ['createdAt', 'DESC'],
      ['importRow', 'DESC'],
      ['id', 'DESC'],
    ],
    transaction,
  });
  return toStored(rows, transaction);
}

export async function listKeysOfEyes(
  eyeIds: readonly string[],
  transaction?: Transaction,
): Promise<MeasurementKey[]> {
  return listKeys('m.eye_id IN (SELECT value FROM json_each($1))', JSON.stringify(eyeIds), transaction);
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
  const rows = await MeasurementModel.sequelize?.query(
    `SELECT m.id, e.patient_id AS patientId, e.side, m.content_hash AS contentHash,
       m.created_at AS createdAt, m.import_row AS importRow
     FROM measurements m JOIN eyes e ON e.id = m.eye_id WHERE ${condition}`,
    { bind: [value], transaction, type: QueryTypes.SELECT },
  );
  return rows as MeasurementKey[];
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

async function toStored(
  rows: readonly MeasurementModel[],
  transaction: Transaction | undefined,
): Promise<StoredMeasurement[]> {
  const [authors, files] = await Promise.all([
    namesOf(
      rows.map((row) => row.createdBy),
      transaction,
    ),
    fileNamesOf(
      rows.flatMap((row) => row.importId ?? []),
      transaction,
    ),
  ]);
  return rows.map((row) => {
    const createdBy = authors.get(row.createdBy) ?? '';
    return {
      id: row.id,
      eyeId: row.eyeId,
      values: valuesOf(row),
      provenance: provenanceOf(row, files, createdBy),
      createdAt: row.createdAt,
      createdBy,
      supersededById: row.supersededById,
      supersededReason: row.supersededReason,
    };
  });
}

function valuesOf(row: MeasurementModel): MeasurementValues {
  return Object.fromEntries(
    VALUE_ATTRIBUTES.map((attribute) => [attribute, row[attribute]]),
  ) as MeasurementValues;
}

function provenanceOf(
  { importId, importRow, raw }: MeasurementModel,
  files: ReadonlyMap<string, string>,
  enteredBy: string,
): Provenance {
  if (importId === null || importRow === null) return { kind: 'manual', enteredBy };
  return { kind: 'file', importId, fileName: files.get(importId) ?? '', row: importRow, raw: raw ?? {} };
}

async function namesOf(ids: string[], transaction?: Transaction): Promise<Map<string, string>> {
  const rows = await AccountModel.findAll({
    attributes: ['id', 'displayName'],
    where: { id: [...new Set(ids)] },
    transaction,
  });
  return new Map(rows.map(({ id, displayName }) => [id, displayName]));
}

async function fileNamesOf(ids: string[], transaction?: Transaction): Promise<Map<string, string>> {
  const rows = await ImportModel.findAll({
    attributes: ['id', 'fileName'],
    where: { id: [...new Set(ids)] },
    transaction,
  });
  return new Map(rows.map(({ id, fileName }) => [id, fileName]));
}
