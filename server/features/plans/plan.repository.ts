import { Op, type Transaction, type WhereOptions } from 'sequelize';
import type { Plan, PlanChoice, PlanInput } from '@/shared/contract';
import { AccountModel } from '@/server/db/models/account';
import { PlanModel } from '@/server/db/models/plan';

/** A plan as it is stored, before it is known whose eye it is for and whether it still fits. */
export interface StoredPlan extends Omit<Plan, 'patientId' | 'side' | 'outOfDateReasons'> {
  eyeId: string;
  /** Moment of the last act on it: what lists are ordered by. */
  actedAt: string;
  /** The exact text that was signed. */
  snapshot: string | null;
}

export interface NewDraft {
  id: string;
  eyeId: string;
  input: PlanInput;
  createdBy: string;
  at: string;
}

export async function addDraft({ at, ...draft }: NewDraft, transaction: Transaction): Promise<void> {
  const last = (await PlanModel.max('sequence', { where: { eyeId: draft.eyeId }, transaction })) as
    number | null;
  const dated = { createdAt: at, updatedAt: at };
  await PlanModel.create({ ...draft, ...dated, sequence: (last ?? 0) + 1, status: 'draft' }, { transaction });
}

export async function findPlan(id: string, transaction?: Transaction): Promise<StoredPlan | undefined> {
  const row = await PlanModel.findByPk(id, { transaction });
  return row ? (await toStored([row], transaction))[0] : undefined;
}

export async function listPlansOfEye(eyeId: string, transaction?: Transaction): Promise<StoredPlan[]> {
  const rows = await PlanModel.findAll({ where: { eyeId }, order: [['sequence', 'DESC']], transaction });
  return toStored(rows, transaction);
}

export interface DraftChange {
  input: PlanInput;
  choice: PlanChoice | null;
  at: string;
}

export async function changeDraft(
  id: string,
  { at, ...change }: DraftChange,
  transaction: Transaction,
): Promise<void> {
  const row = await PlanModel.findByPk(id, { transaction, rejectOnEmpty: true });
  await row.update({ ...change, updatedAt: at }, { transaction });
}

export async function discardDraft(id: string, at: string, transaction: Transaction): Promise<void> {
  const row = await PlanModel.findByPk(id, { transaction, rejectOnEmpty: true });
  await row.update({ status: 'discarded', updatedAt: at }, { transaction });
}

export interface Signing {
  signedBy: string;
  at: string;
  snapshot: string;
  digest: string;
}

/** Puts the draft in the place of the eye's signed plan, if there is one: two never stand at the same time. */
export async function storeSignature(
  id: string,
  { at, ...signed }: Signing,
  transaction: Transaction,
): Promise<void> {
  const row = await PlanModel.findByPk(id, { transaction, rejectOnEmpty: true });
  const earlier = await PlanModel.findOne({ where: { eyeId: row.eyeId, status: 'signed' }, transaction });
  await earlier?.update({ status: 'replaced', replacedById: id, updatedAt: at }, { transaction });
  await row.update({ ...signed, status: 'signed', signedAt: at, updatedAt: at }, { transaction });
}

export interface PlanFilter {
  statuses: readonly Plan['status'][];
  /** Only plans of these eyes; undefined for all. */
  eyeIds: readonly string[] | undefined;
  /** Moment and id of the last plan of the page before. */
  after: readonly [string, string] | undefined;
  count: number;
}

/** Newest act first. */
export async function listPlansAfter({ statuses, eyeIds, after, count }: PlanFilter): Promise<StoredPlan[]> {
  const beyond: WhereOptions = after
    ? { [Op.or]: [{ updatedAt: { [Op.lt]: after[0] } }, { updatedAt: after[0], id: { [Op.lt]: after[1] } }] }
    : {};
  const ofEyes = eyeIds ? { eyeId: [...eyeIds] } : {};
  const rows = await PlanModel.findAll({
    where: { [Op.and]: [{ status: [...statuses], ...ofEyes }, beyond] },
    order: [
      ['updatedAt', 'DESC'],
      ['id', 'DESC'],
    ],
    limit: count,
  });
  return toStored(rows);
}

async function toStored(rows: readonly PlanModel[], transaction?: Transaction): Promise<StoredPlan[]> {
  const ids = [
    ...new Set(rows.flatMap(({ createdBy, signedBy }) => [createdBy, ...(signedBy ? [signedBy] : [])])),
  ];
  const accounts =
    ids.length > 0
      ? await AccountModel.findAll({ attributes: ['id', 'displayName'], where: { id: ids }, transaction })
      : [];
  const nameOf = (id: string | null) =>
    id === null ? null : (accounts.find((account) => account.id === id)?.displayName ?? '—');
  return rows.map((row) => ({
    id: row.id,
    eyeId: row.eyeId,
    sequence: row.sequence,
    status: row.status,
    input: row.input,
    choice: row.choice,
    createdBy: nameOf(row.createdBy) ?? '—',
    createdAt: row.createdAt,
    signedBy: nameOf(row.signedBy),
    signedAt: row.signedAt,
    digest: row.digest,
    snapshot: row.snapshot,
    actedAt: row.updatedAt,
    version: row.version ?? 0,
  }));
}
