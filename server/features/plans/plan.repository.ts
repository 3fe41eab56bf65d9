import type { Transaction } from 'sequelize';
import type { Plan, PlanChoice, PlanInput } from '@/shared/contract';
import { PlanModel } from '@/server/db/models/plan';
import { asList, columnList, IN_FIRST, selectRows } from '@/server/db/select-rows';

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
  const [plan] = await selectPlans('p.id = $1', [id], transaction);
  return plan;
}

export async function listPlansOfEye(eyeId: string, transaction?: Transaction): Promise<StoredPlan[]> {
  return selectPlans('p.eye_id = $1 ORDER BY p.sequence DESC', [eyeId], transaction);
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
  /** Only plans of these patients; undefined for all. */
  patientIds: readonly string[] | undefined;
  /** Moment and id of the last plan of the page before. */
  after: readonly [string, string] | undefined;
  count: number;
}

/** Newest act first. The page is found by ids, so that no signed text is sorted. */
export async function listPlansAfter({
  statuses,
  patientIds,
  after,
  count,
}: PlanFilter): Promise<StoredPlan[]> {
  const page = `SELECT id FROM plans
    WHERE status ${IN_FIRST}
      AND ($2 IS NULL OR eye_id IN
        (SELECT id FROM eyes WHERE patient_id IN (SELECT value FROM json_each($2))))
      AND ($3 IS NULL OR updated_at < $3 OR (updated_at = $3 AND id < $4))
    ORDER BY updated_at DESC, id DESC LIMIT $5`;
  return selectPlans(`p.id IN (${page}) ORDER BY p.updated_at DESC, p.id DESC`, [
    asList(statuses),
    patientIds ? asList(patientIds) : null,
    after?.[0] ?? null,
    after?.[1] ?? null,
    count,
  ]);
}

export async function countPlans(statuses: readonly Plan['status'][]): Promise<number> {
  const sql = `SELECT count(*) AS total FROM plans WHERE status ${IN_FIRST}`;
  const [row] = await selectRows<{ total: number }>(PlanModel, {
    sql,
    bind: [asList(statuses)],
    transaction: undefined,
  });
  return row?.total ?? 0;
}

const STORED_ATTRIBUTES = [
  'id',
  'eyeId',
  'sequence',
  'status',
  'input',
  'choice',
  'createdAt',
  'signedAt',
  'digest',
  'snapshot',
  'version',
] as const;

/** As the columns hold it, with the names of those who made and signed it. */
type PlanRow = Omit<StoredPlan, 'input' | 'choice'> & { input: string; choice: string | null };

async function selectPlans(
  condition: string,
  bind: readonly (string | number | null)[],
  transaction?: Transaction,
): Promise<StoredPlan[]> {
  const sql = `SELECT ${columnList(PlanModel, STORED_ATTRIBUTES, 'p')}, p.updated_at AS actedAt,
       author.display_name AS createdBy, signer.display_name AS signedBy
     FROM plans p JOIN accounts author ON author.id = p.created_by
       LEFT JOIN accounts signer ON signer.id = p.signed_by
     WHERE ${condition}`;
  const rows = await selectRows<PlanRow>(PlanModel, { sql, bind, transaction });
  return rows.map(({ input, choice, ...row }) => ({
    ...row,
    input: JSON.parse(input) as PlanInput,
    choice: choice === null ? null : (JSON.parse(choice) as PlanChoice),
  }));
}
