/** Signing in, staying signed in, signing out. */
import type { Session } from '@/shared/contract';
import { inAct, type AnyAct } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Deps } from '@/server/deps';
import {
  findByEmail,
  findById,
  recordSignIn,
  toSessionUser,
  type StoredAccount,
} from '@/server/features/accounts/account.service';
import { ACCESS_TOKEN_LIFE_S, signAccessToken } from '@/server/http/access-token';
import { ProblemError } from '@/server/http/problem';
import { matchesPassword } from './password';
import { endFamilyOf, rotate, startFamily, type IssuedToken } from './session.service';

export interface Credentials {
  email: string;
  password: string;
  clientIp: string;
  requestId: string;
}

/** A sign-in as the client gets it, and the secret that goes into its cookie. */
export interface StartedSession {
  session: Session;
  refreshToken: string;
}

export async function signIn(deps: Deps, credentials: Credentials): Promise<StartedSession> {
  const { email, password, clientIp, requestId } = credentials;
  const throttleKey = `sign-in ${email} ${clientIp}`;
  const attemptsLeft = deps.throttle.attempt(throttleKey);
  const account = await findByEmail(email);
  const passwordHash = account?.status === 'active' ? account.passwordHash : null;
  if (!(await matchesPassword(password, passwordHash)) || !account) {
    await inAct(deps, { actor: null, requestId }, (act) =>
      recordSignInRefusal(act, { account, attemptsLeft }),
    );
    throw new ProblemError('wrong-credentials');
  }
  deps.throttle.reset(throttleKey);
  return inAct(deps, { actor: account, requestId }, (act) => start(deps, act, account.id));
}

async function start(deps: Deps, act: AnyAct, accountId: string): Promise<StartedSession> {
  // The account may have been disabled while the password was checked.
  const account = await findById(accountId, act.transaction);
  if (account?.status !== 'active') throw new ProblemError('wrong-credentials');
  const issued = await startFamily(deps, account.id, act.transaction);
  await recordSignIn(act, account.id);
  await recordAudit(act, { action: 'session.start', noun: 'session', nounId: issued.familyId });
  return toStartedSession(deps, issued, account);
}

async function recordSignInRefusal(
  act: AnyAct,
  { account, attemptsLeft }: { account: StoredAccount | undefined; attemptsLeft: number },
): Promise<void> {
  const reason = account
    ? account.status === 'active'
      ? 'wrong password'
      : account.status
    : 'no such account';
  const detail = { reason, attemptsLeft };
  await recordAudit(act, { action: 'session.refused', noun: 'account', nounId: account?.id, detail });
}

/** Trades a refresh token for the next one and a new access token. */
export async function refresh(
  deps: Deps,
  { presented, requestId }: { presented: string; requestId: string },
): Promise<StartedSession> {
  const started = await inAct(deps, { actor: null, requestId }, async (act) => {
    const rotation = await rotate(deps, presented, act.transaction);
    if (rotation.outcome === 'reused') {
      const { accountId, familyId } = rotation;
      const detail = { accountId };
      await recordAudit(act, { action: 'session.reused', noun: 'session', nounId: familyId, detail });
    }
    if (rotation.outcome !== 'rotated') return undefined;
    const account = await findById(rotation.issued.accountId, act.transaction);
    return account?.status === 'active' ? toStartedSession(deps, rotation.issued, account) : undefined;
  });
  // Thrown after the commit: the revocation of a family must stay.
  if (!started) throw new ProblemError('unauthenticated', 'The sign-in has ended');
  return started;
}

export async function signOut(
  deps: Deps,
  { presented, requestId }: { presented: string; requestId: string },
): Promise<void> {
  await inAct(deps, { actor: null, requestId }, async (act) => {
    const ended = await endFamilyOf(presented, act);
    const account = ended && (await findById(ended.accountId, act.transaction));
    if (!ended || !account) return;
    const note = { action: 'session.end', noun: 'session', nounId: ended.familyId };
    await recordAudit({ ...act, actor: account }, note);
  });
}

function toStartedSession(deps: Deps, issued: IssuedToken, account: StoredAccount): StartedSession {
  const key = { secret: deps.tokenSecret, clock: deps.clock };
  return {
    session: {
      accessToken: signAccessToken(key, issued),
      expiresInS: ACCESS_TOKEN_LIFE_S,
      user: toSessionUser(account),
    },
    refreshToken: issued.refreshToken,
  };
}
