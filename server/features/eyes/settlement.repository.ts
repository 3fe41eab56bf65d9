import type { Transaction } from 'sequelize';
import { AccountModel } from '@/server/db/models/account';
import { EyeModel } from '@/server/db/models/eye';
import { FlagSettlementModel } from '@/server/db/models/flag-settlement';

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
  const rows = await FlagSettlementModel.findAll({
    where: { eyeId: [...eyeIds] },
    order: [['settledAt', 'DESC']],
    transaction,
  });
  const eyes = await EyeModel.findAll({
    attributes: ['id', 'updatedAt'],
    where: { id: [...eyeIds] },
    transaction,
  });
  const changedAt = new Map(eyes.map(({ id, updatedAt }) => [id, updatedAt]));
  const people = await AccountModel.findAll({
    attributes: ['id', 'displayName'],
    where: { id: [...new Set(rows.map(({ settledBy }) => settledBy))] },
    transaction,
  });
  const names = new Map(people.map(({ id, displayName }) => [id, displayName]));
  const standing = rows.filter(({ eyeId, settledAt }) => settledAt >= (changedAt.get(eyeId) ?? ''));
  return standing.map(({ eyeId, measurementId, ruleId, settledBy, settledAt, reason }) => ({
    eyeId,
    measurementId,
    ruleId,
    by: names.get(settledBy) ?? '',
    at: settledAt,
    reason,
  }));
}
