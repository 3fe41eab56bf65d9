import { Op, type Transaction } from 'sequelize';
import { AccountModel } from '@/server/db/models/account';
import { RefreshSessionModel } from '@/server/db/models/refresh-session';
import type { Role } from '@/shared/contract';

/** One refresh token, as the services see it. */
export interface RefreshToken {
  id: string;
  familyId: string;
  accountId: string;
  tokenHash: string;
  createdAt: string;
  lastUsedAt: string;
  rotatedAt: string | null;
  expiresAt: string;
  revokedAt: string | null;
}

export interface LiveSession {
  account: { id: string; displayName: string; roles: Role[] };
  lastUsedAt: string;
}

/** The account of a sign-in, when the account is active and the sign-in neither ended nor expired. */
export async function findLiveSession(
  accountId: string,
  familyId: string,
  now: string,
): Promise<LiveSession | undefined> {
  const [account, newest] = await Promise.all([
    AccountModel.findOne({ where: { id: accountId, status: 'active' } }),
    RefreshSessionModel.findOne({
      where: { familyId, accountId, revokedAt: null, expiresAt: { [Op.gt]: now } },
      order: [['lastUsedAt', 'DESC']],
    }),
  ]);
  if (!account || !newest) return undefined;
  const { id, displayName, roles } = account;
  return { account: { id, displayName, roles }, lastUsedAt: newest.lastUsedAt };
}

export async function touchFamily(familyId: string, at: string, transaction: Transaction): Promise<void> {
  const where = { familyId, rotatedAt: null };
  await RefreshSessionModel.update({ lastUsedAt: at }, { where, transaction });
}

export async function addRefreshToken(token: RefreshToken, transaction: Transaction): Promise<void> {
  await RefreshSessionModel.create(token, { transaction });
}

export async function findRefreshToken(
  tokenHash: string,
  transaction: Transaction,
): Promise<RefreshToken | undefined> {
  const row = await RefreshSessionModel.findOne({ where: { tokenHash }, transaction });
  return row?.get();
}

export async function markRotated(id: string, at: string, transaction: Transaction): Promise<void> {
  await RefreshSessionModel.update({ rotatedAt: at }, { where: { id }, transaction });
}

export async function revokeFamily(familyId: string, at: string, transaction: Transaction): Promise<void> {
  await RefreshSessionModel.update({ revokedAt: at }, { where: { familyId, revokedAt: null }, transaction });
}

export async function revokeAllOf(accountId: string, at: string, transaction: Transaction): Promise<void> {
  await RefreshSessionModel.update({ revokedAt: at }, { where: { accountId, revokedAt: null }, transaction });
}

export async function forgetExpired(before: string, transaction: Transaction): Promise<void> {
  await RefreshSessionModel.destroy({ where: { expiresAt: { [Op.lt]: before } }, transaction });
}
