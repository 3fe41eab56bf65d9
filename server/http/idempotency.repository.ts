import { Op } from 'sequelize';
import type { Act } from '@/server/act';
import { IdempotencyKeyModel } from '@/server/db/models/idempotency-key';
import type { Reply } from '@/server/http/reply';

export interface StoredReply {
  bodyHash: string;
  reply: Reply;
}

export async function findStoredReply(act: Act, key: string): Promise<StoredReply | undefined> {
  const where = { key, accountId: act.actor.id };
  const row = await IdempotencyKeyModel.findOne({ where, transaction: act.transaction });
  return row ? { bodyHash: row.bodyHash, reply: { status: row.status, ...row.reply } } : undefined;
}

export async function storeReply(act: Act, key: string, stored: StoredReply): Promise<void> {
  const { status, body, headers } = stored.reply;
  const row = {
    key,
    accountId: act.actor.id,
    bodyHash: stored.bodyHash,
    status,
    reply: { body, headers },
    createdAt: act.at,
  };
  await IdempotencyKeyModel.create(row, { transaction: act.transaction });
}

export async function forgetRepliesBefore(act: Act, oldest: string): Promise<void> {
  const where = { createdAt: { [Op.lt]: oldest } };
  await IdempotencyKeyModel.destroy({ where, transaction: act.transaction });
}
