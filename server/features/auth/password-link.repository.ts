import { Op } from 'sequelize';
import type { AnyAct } from '@/server/act';
import { PasswordLinkModel } from '@/server/db/models/password-link';
import type { Transaction } from '@/server/db/write-queue';

export interface StoredLink {
  id: string;
  kind: 'invitation' | 'reset';
  accountId: string;
  expiresAt: string;
}

export async function addLink(act: AnyAct, link: StoredLink & { tokenHash: string }): Promise<void> {
  await PasswordLinkModel.create(link, { transaction: act.transaction });
}

/** A link that is neither used nor expired. */
export async function findOpenLink(
  tokenHash: string,
  now: string,
  transaction?: Transaction,
): Promise<StoredLink | undefined> {
  const where = { tokenHash, usedAt: null, expiresAt: { [Op.gt]: now } };
  const row = await PasswordLinkModel.findOne({ where, transaction });
  if (!row) return undefined;
  const { id, kind, accountId, expiresAt } = row;
  return { id, kind, accountId, expiresAt };
}

/** Nobody can use any link of this account any more. */
export async function closeLinksOf(act: AnyAct, accountId: string): Promise<void> {
  const where = { accountId, usedAt: null };
  await PasswordLinkModel.update({ usedAt: act.at }, { where, transaction: act.transaction });
}
