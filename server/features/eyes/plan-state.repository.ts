import type { Transaction } from 'sequelize';
import { PlanModel } from '@/server/db/models/plan';

/** What the plans of an eye say about where it stands. */
export interface PlanState {
  hasDraft: boolean;
  /** The measurement that the standing signature rests on. */
  signedMeasurementId: string | null;
}

export async function findPlanStates(
  eyeIds: readonly string[],
  transaction?: Transaction,
): Promise<Map<string, PlanState>> {
  const rows = await PlanModel.findAll({
    attributes: ['eyeId', 'status', 'input'],
    where: { eyeId: [...eyeIds], status: ['draft', 'signed'] },
    transaction,
  });
  const states = new Map<string, PlanState>();
  for (const { eyeId, status, input } of rows) {
    const state = states.get(eyeId) ?? { hasDraft: false, signedMeasurementId: null };
    if (status === 'draft') state.hasDraft = true;
    else state.signedMeasurementId = input.measurementId;
    states.set(eyeId, state);
  }
  return states;
}
