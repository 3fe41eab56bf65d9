/** The life of a sign-in: who it belongs to, when it was last used, how its refresh token turns over. */
import { createHash } from 'node:crypto';
import type { Actor, AnyAct } from '@/server/act';
import type { Transaction } from '@/server/db/write-queue';
import type { Deps } from '@/server/deps';
import type { TokenSubject } from '@/server/http/access-token';
import {
  addRefreshToken,
  findLiveSession,
  findRefreshToken,
  forgetExpired,
  markRotated,
  revokeAllOf,
  revokeFamily,
  touchFamily,
  type RefreshToken,
} from './session.repository';

/** Without a request for this long the sign-in ends (common practice in clinics). */
export const IDLE_LIMIT_MS = 15 * 60 * 1000;
/** And it ends after this long in any case. */
export const ABSOLUTE_LIMIT_MS = 12 * 60 * 60 * 1000;
/** Two tabs may present the same refresh token at once; later than this it was stolen or copied. */
export const ROTATION_GRACE_MS = 30 * 1000;
/** Use is noted at most this often, to keep reading from turning into writing. */
const TOUCH_EVERY_MS = 60 * 1000;

export async function findActiveActor(
  deps: Deps,
  { accountId, familyId }: TokenSubject,
): Promise<Actor | undefined> {
  const now = deps.clock.now();
  const session = await findLiveSession(accountId, familyId, now.toISOString());
  if (!session) return undefined;
  const unusedMs = now.getTime() - Date.parse(session.lastUsedAt);
  if (unusedMs > IDLE_LIMIT_MS) return undefined;
  if (unusedMs > TOUCH_EVERY_MS) {
    await deps.db.inWrite((transaction) => touchFamily(familyId, now.toISOString(), transaction));
  }
  return { ...session.account, sessionFamilyId: familyId };
}

export interface IssuedToken {
  /** The secret itself, for the cookie; only its digest is stored. */
  refreshToken: string;
  familyId: string;
  accountId: string;
}

/** Starts the family of refresh tokens of one sign-in. */
export async function startFamily(
  deps: Deps,
  accountId: string,
  transaction: Transaction,
): Promise<IssuedToken> {
  const now = deps.clock.now();
  await forgetExpired(new Date(now.getTime() - ABSOLUTE_LIMIT_MS).toISOString(), transaction);
  const expiresAt = new Date(now.getTime() + ABSOLUTE_LIMIT_MS).toISOString();
  return issue(deps, { accountId, familyId: deps.random.uuid(), expiresAt }, transaction);
}

export type Rotation =
  | { outcome: 'rotated'; issued: IssuedToken }
  | { outcome: 'refused' }
  /** The token had been used up before: the whole family is revoked. */
  | { outcome: 'reused'; accountId: string; familyId: string };

/** Uses up a refresh token and gives the next one of its family. */
export async function rotate(deps: Deps, presented: string, transaction: Transaction): Promise<Rotation> {
  const nowMs = deps.clock.now().getTime();
  const token = await findRefreshToken(digestOf(presented), transaction);
  if (!token || token.revokedAt !== null || Date.parse(token.expiresAt) <= nowMs)
    return { outcome: 'refused' };
  if (token.rotatedAt === null) return rotateFresh(deps, token, transaction);
  if (nowMs - Date.parse(token.rotatedAt) <= ROTATION_GRACE_MS) {
    return { outcome: 'rotated', issued: await issue(deps, token, transaction) };
  }
  const { accountId, familyId } = token;
  await revokeFamily(familyId, deps.clock.now().toISOString(), transaction);
  return { outcome: 'reused', accountId, familyId };
}

async function rotateFresh(deps: Deps, token: RefreshToken, transaction: Transaction): Promise<Rotation> {
  const now = deps.clock.now();
  if (now.getTime() - Date.parse(token.lastUsedAt) > IDLE_LIMIT_MS) return { outcome: 'refused' };
  await markRotated(token.id, now.toISOString(), transaction);
  return { outcome: 'rotated', issued: await issue(deps, token, transaction) };
}

async function issue(
  deps: Deps,
  { accountId, familyId, expiresAt }: Pick<RefreshToken, 'accountId' | 'familyId' | 'expiresAt'>,
  transaction: Transaction,
): Promise<IssuedToken> {
  const refreshToken = deps.random.token();
  const now = deps.clock.now().toISOString();
  await addRefreshToken(
    {
      id: deps.random.uuid(),
      familyId,
      accountId,
      tokenHash: digestOf(refreshToken),
      createdAt: now,
      lastUsedAt: now,
      rotatedAt: null,
      expiresAt,
      revokedAt: null,
    },
    transaction,
  );
  return { refreshToken, familyId, accountId };
}

/** Ends the sign-in that a refresh token belongs to; null when it belongs to none that stands. */
export async function endFamilyOf(
  presented: string,
  act: AnyAct,
): Promise<{ accountId: string; familyId: string } | null> {
  const token = await findRefreshToken(digestOf(presented), act.transaction);
  if (!token || token.revokedAt !== null) return null;
  await revokeFamily(token.familyId, act.at, act.transaction);
  return { accountId: token.accountId, familyId: token.familyId };
}

/** After a change of password or roles, or when the account is disabled. */
export async function endAllSessionsOf(act: AnyAct, accountId: string): Promise<void> {
  await revokeAllOf(accountId, act.at, act.transaction);
}

/** Tokens are random and long: a plain digest is enough, and can be looked up. */
export function digestOf(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
