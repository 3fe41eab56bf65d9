import { QueryTypes, type Transaction } from 'sequelize';
import type { Eye, EyeHistory, Side } from '@/shared/contract';
import { insertRows } from '@/server/db/insert-rows';
import { EyeModel } from '@/server/db/models/eye';

/** An eye as the many rows of a list or an import need it. */
export interface EyeKey {
  id: string;
  patientId: string;
  side: Side;
}

const ATTRIBUTES = ['id', 'patientId', 'side', 'remarks', 'version', 'createdAt', 'updatedAt'] as const;

export async function addEyes(eyes: readonly EyeKey[], at: string, transaction: Transaction): Promise<void> {
  const rows = eyes.map(({ id, patientId, side }) => [id, patientId, side, '', 0, at, at]);
  await insertRows(EyeModel, { attributes: ATTRIBUTES, rows, transaction });
}

export async function findEyes(patientId: string, transaction?: Transaction): Promise<Eye[]> {
  return (await EyeModel.findAll({ where: { patientId }, transaction })).map(toEye);
}

export async function findEyeById(id: string, transaction?: Transaction): Promise<Eye | undefined> {
  const row = await EyeModel.findByPk(id, { transaction });
  return row ? toEye(row) : undefined;
}

export async function listEyesOfPatients(
  patientIds: readonly string[],
  transaction?: Transaction,
): Promise<Eye[]> {
  return (await EyeModel.findAll({ where: { patientId: [...patientIds] }, transaction })).map(toEye);
}

export async function listEyeKeys(
  patientIds: readonly string[],
  transaction?: Transaction,
): Promise<EyeKey[]> {
  if (patientIds.length === 0) return [];
  const rows = await EyeModel.sequelize?.query(
    `SELECT id, patient_id AS patientId, side FROM eyes
     WHERE patient_id IN (SELECT value FROM json_each($1))`,
    { bind: [JSON.stringify(patientIds)], transaction, type: QueryTypes.SELECT },
  );
  return rows as EyeKey[];
}

export async function changeHistory(
  id: string,
  { at, ...history }: EyeHistory & { at: string },
  transaction: Transaction,
): Promise<Eye> {
  const row = await EyeModel.findByPk(id, { transaction, rejectOnEmpty: true });
  return toEye(await row.update({ ...history, updatedAt: at }, { transaction }));
}

function toEye(row: EyeModel): Eye {
  const { id, patientId, side, version } = row;
  const { cornealSurgery, cornealSurgeryKind, lensStatus, vitreousStatus, remarks } = row;
  return {
    id,
    patientId,
    side,
    history: { cornealSurgery, cornealSurgeryKind, lensStatus, vitreousStatus, remarks },
    version,
  };
}
