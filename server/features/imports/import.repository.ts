import { Op, type Transaction } from 'sequelize';
import type { BiometryImport } from '@/shared/contract';
import { AccountModel } from '@/server/db/models/account';
import { ImportModel } from '@/server/db/models/import';

/** An import without its bytes; people by their names. Progress is not stored. */
export type StoredImport = Omit<BiometryImport, 'progress'>;

export interface NewImport {
  id: string;
  fileName: string;
  bytes: Buffer;
  sha256: string;
  uploadedBy: string;
  uploadedAt: string;
  sameFileAs: string | null;
}

const WITHOUT_BYTES = { exclude: ['bytes'] };
const NO_COUNTS = { created: 0, alreadyThere: 0, refused: 0, newPatients: 0 };

export async function addImport(file: NewImport, transaction: Transaction): Promise<void> {
  await ImportModel.create(
    { ...file, sizeBytes: file.bytes.length, status: 'checking', counts: NO_COUNTS, problems: [] },
    { transaction },
  );
}

export async function findImport(id: string, transaction?: Transaction): Promise<StoredImport | undefined> {
  const row = await ImportModel.findByPk(id, { attributes: WITHOUT_BYTES, transaction });
  return row ? (await toImports([row], transaction))[0] : undefined;
}

export async function findImportBytes(id: string, transaction?: Transaction): Promise<Buffer | undefined> {
  const row = await ImportModel.findByPk(id, { attributes: ['bytes'], transaction });
  return row?.bytes;
}

/** The stored import of the same bytes, if there is one. */
export async function findStoredBySha256(
  sha256: string,
  transaction: Transaction,
): Promise<string | undefined> {
  const where = { sha256, status: 'stored' as const };
  const row = await ImportModel.findOne({ attributes: ['id'], where, order: ['storedAt'], transaction });
  return row?.id;
}

/** Imports from the newest on, from the one after `after`. */
export async function listImportsAfter(
  after: readonly [uploadedAt: string, id: string] | undefined,
  count: number,
): Promise<StoredImport[]> {
  const [uploadedAt, id] = after ?? [];
  const beyond = { [Op.or]: [{ uploadedAt: { [Op.lt]: uploadedAt } }, { uploadedAt, id: { [Op.lt]: id } }] };
  const rows = await ImportModel.findAll({
    attributes: WITHOUT_BYTES,
    where: after ? beyond : {},
    order: [
      ['uploadedAt', 'DESC'],
      ['id', 'DESC'],
    ],
    limit: count,
  });
  return toImports(rows, undefined);
}

/** Imports that wait for somebody's decision, newest first. */
export async function listReady(): Promise<StoredImport[]> {
  const rows = await ImportModel.findAll({
    attributes: WITHOUT_BYTES,
    where: { status: 'ready' },
    order: [
      ['uploadedAt', 'DESC'],
      ['id', 'DESC'],
    ],
  });
  return toImports(rows, undefined);
}

export interface ImportChange {
  status: BiometryImport['status'];
  /** Account id. */
  storedBy?: string | null;
  storedAt?: string | null;
  readAs?: string;
  counts?: BiometryImport['counts'];
  problems?: BiometryImport['problems'];
}

/** Changes the import if it still has the status expected; says whether it did. */
export async function changeImport(
  id: string,
  { from, ...change }: ImportChange & { from: BiometryImport['status'] },
  transaction: Transaction,
): Promise<boolean> {
  const [count] = await ImportModel.update(change, { where: { id, status: from }, transaction });
  return count === 1;
}

export async function listIdsWithStatus(
  status: BiometryImport['status'],
  transaction: Transaction,
): Promise<string[]> {
  const rows = await ImportModel.findAll({ attributes: ['id'], where: { status }, transaction });
  return rows.map(({ id }) => id);
}

async function toImports(
  rows: readonly ImportModel[],
  transaction: Transaction | undefined,
): Promise<StoredImport[]> {
  const ids = rows.flatMap(({ uploadedBy, storedBy }) => [uploadedBy, storedBy ?? []].flat());
  const people = await AccountModel.findAll({
    attributes: ['id', 'displayName'],
    where: { id: [...new Set(ids)] },
    transaction,
  });
  const names = new Map(people.map(({ id, displayName }) => [id, displayName]));
  return rows.map((row) => ({
    id: row.id,
    fileName: row.fileName,
    sizeBytes: row.sizeBytes,
    sha256: row.sha256,
    status: row.status,
    uploadedBy: names.get(row.uploadedBy) ?? '',
    uploadedAt: row.uploadedAt,
    storedBy: row.storedBy === null ? null : (names.get(row.storedBy) ?? ''),
    storedAt: row.storedAt,
    readAs: row.readAs,
    counts: row.counts,
    problems: row.problems,
    sameFileAs: row.sameFileAs,
  }));
}
