import { Op, type Transaction } from 'sequelize';
import { RefreshSessionModel } from '@/server/db/models/refresh-session';
import { selectRows } from '@/server/db/select-rows';
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
  const sql = `SELECT a.id, a.display_name AS displayName, a.roles, s.last_used_at AS lastUsedAt
     FROM refresh_sessions s JOIN accounts a ON a.id = s.account_id
     WHERE s.family_id = $1 AND s.account_id = $2 AND s.revoked_at IS NULL AND s.expires_at > $3
       AND a.status = 'active'
     ORDER BY s.last_used_at DESC LIMIT 1`;
  const [row] = await selectRows<SessionRow>(RefreshSessionModel, {
    sql,
    bind: [familyId, accountId, now],
    transaction: undefined,
  });
  if (!row) return undefined;
  const { id, displayName, roles, lastUsedAt } = row;
  return { account: { id, displayName, roles: JSON.parse(roles) as Role[] }, lastUsedAt };
}

interface SessionRow {
  id: string;
  displayName: string;
  /** JSON. */
  roles: string;
  lastUsedAt: string;
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
