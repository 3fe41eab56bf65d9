import type { Transaction } from 'sequelize';
import { PlanModel } from '@/server/db/models/plan';

/** What the plans of an eye say about where it stands. */
export interface PlanState {
  hasDraft: boolean;
  /** The standing signature: its text and digest. */
  signed: { snapshot: string | null; digest: string | null } | null;
}

export async function findPlanStates(
  eyeIds: readonly string[],
  transaction?: Transaction,
): Promise<Map<string, PlanState>> {
  const rows = await PlanModel.findAll({
    attributes: ['eyeId', 'status', 'snapshot', 'digest'],
    where: { eyeId: [...eyeIds], status: ['draft', 'signed'] },
    transaction,
  });
  const states = new Map<string, PlanState>();
  for (const { eyeId, status, snapshot, digest } of rows) {
    const state = states.get(eyeId) ?? { hasDraft: false, signed: null };
    if (status === 'draft') state.hasDraft = true;
    else state.signed = { snapshot, digest };
    states.set(eyeId, state);
  }
  return states;
}
