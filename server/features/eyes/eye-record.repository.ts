import type { Transaction } from 'sequelize';
import type { Eye, EyeHistory, Side } from '@/shared/contract';
import { insertRows } from '@/server/db/insert-rows';
import { EyeModel } from '@/server/db/models/eye';
import { asList, columnList, IN_FIRST, selectRows } from '@/server/db/select-rows';

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
  return listEyesOfPatients([patientId], transaction);
}

export async function findEyeById(id: string, transaction?: Transaction): Promise<Eye | undefined> {
  const [row] = await selectEyes('id = $1', id, transaction);
  return row && toEye(row);
}

/** The eye and its fellow; none when there is no such eye. */
export async function findPairOf(eyeId: string, transaction?: Transaction): Promise<Eye[]> {
  const condition = 'patient_id = (SELECT patient_id FROM eyes WHERE id = $1)';
  return (await selectEyes(condition, eyeId, transaction)).map(toEye);
}

export async function listEyesOfPatients(
  patientIds: readonly string[],
  transaction?: Transaction,
): Promise<Eye[]> {
  return (await selectEyes(`patient_id ${IN_FIRST}`, asList(patientIds), transaction)).map(toEye);
}

/** Both eyes of everybody to whom one of these belongs. */
export async function listPairsOf(eyeIds: readonly string[], transaction?: Transaction): Promise<Eye[]> {
  const condition = `patient_id IN (SELECT patient_id FROM eyes WHERE id ${IN_FIRST})`;
  return (await selectEyes(condition, asList(eyeIds), transaction)).map(toEye);
}

export async function listEyeKeys(
  patientIds: readonly string[],
  transaction?: Transaction,
): Promise<EyeKey[]> {
  const sql = `SELECT ${columnList(EyeModel, ['id', 'patientId', 'side'])} FROM eyes WHERE patient_id ${IN_FIRST}`;
  return selectRows<EyeKey>(EyeModel, { sql, bind: [asList(patientIds)], transaction });
}

export async function changeHistory(
  id: string,
  { at, ...history }: EyeHistory & { at: string },
  transaction: Transaction,
): Promise<Eye> {
  const row = await EyeModel.findByPk(id, { transaction, rejectOnEmpty: true });
  return toEye(await row.update({ ...history, updatedAt: at }, { transaction }));
}

const EYE_ATTRIBUTES = [
  'id',
  'patientId',
  'side',
  'cornealSurgery',
  'cornealSurgeryKind',
  'lensStatus',
  'vitreousStatus',
  'remarks',
  'version',
] as const;
type EyeRow = Pick<EyeModel, (typeof EYE_ATTRIBUTES)[number]>;

function selectEyes(
  condition: string,
  value: string,
  transaction: Transaction | undefined,
): Promise<EyeRow[]> {
  const sql = `SELECT ${columnList(EyeModel, EYE_ATTRIBUTES)} FROM eyes WHERE ${condition}`;
  return selectRows<EyeRow>(EyeModel, { sql, bind: [value], transaction });
}

function toEye(row: EyeRow): Eye {
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
