import type { Transaction } from 'sequelize';
import { PlanModel } from '@/server/db/models/plan';
import { asList, IN_FIRST, selectRows } from '@/server/db/select-rows';

/** What the plans of an eye say about where it stands. */
export interface PlanState {
  hasDraft: boolean;
  /** The standing signature: its text and digest. */
  signed: { snapshot: string | null; digest: string | null } | null;
}

interface PlanStateRow {
  eyeId: string;
  status: 'draft' | 'signed';
  snapshot: string | null;
  digest: string | null;
}

export async function findPlanStates(
  eyeIds: readonly string[],
  transaction?: Transaction,
): Promise<Map<string, PlanState>> {
  const sql = `SELECT eye_id AS eyeId, status, snapshot, digest FROM plans
     WHERE eye_id ${IN_FIRST} AND status IN ('draft', 'signed')`;
  const rows = await selectRows<PlanStateRow>(PlanModel, { sql, bind: [asList(eyeIds)], transaction });
  const states = new Map<string, PlanState>();
  for (const { eyeId, status, snapshot, digest } of rows) {
    const state = states.get(eyeId) ?? { hasDraft: false, signed: null };
    if (status === 'draft') state.hasDraft = true;
    else state.signed = { snapshot, digest };
    states.set(eyeId, state);
  }
  return states;
}
