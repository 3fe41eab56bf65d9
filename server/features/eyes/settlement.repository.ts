import type { Transaction } from 'sequelize';
import { FlagSettlementModel } from '@/server/db/models/flag-settlement';
import { asList, IN_FIRST, selectRows } from '@/server/db/select-rows';

/** A flag settled by a named person with a reason. */
export interface Settlement {
  eyeId: string;
  measurementId: string | null;
  ruleId: string;
  by: string;
  at: string;
  reason: string;
}

export interface NewSettlement {
  id: string;
  eyeId: string;
  measurementId: string | null;
  ruleId: string;
  reason: string;
  /** Account id. */
  settledBy: string;
  settledAt: string;
}

export async function addSettlement(settlement: NewSettlement, transaction: Transaction): Promise<void> {
  await FlagSettlementModel.create(settlement, { transaction });
}

/** Those that still count, newest first: a change of the eye's history voids what was settled before it. */
export async function listSettlements(
  eyeIds: readonly string[],
  transaction?: Transaction,
): Promise<Settlement[]> {
  const sql = `SELECT s.eye_id AS eyeId, s.measurement_id AS measurementId, s.rule_id AS ruleId,
       a.display_name AS "by", s.settled_at AS at, s.reason
     FROM flag_settlements s JOIN eyes e ON e.id = s.eye_id JOIN accounts a ON a.id = s.settled_by
     WHERE s.eye_id ${IN_FIRST} AND s.settled_at >= e.updated_at
     ORDER BY s.settled_at DESC, s.id`;
  return selectRows<Settlement>(FlagSettlementModel, { sql, bind: [asList(eyeIds)], transaction });
}
