/** A new access token from the cookie: one attempt for all callers, and never under another person's name. */
import { paths, sessionSchema } from '@/shared/contract';
import type { Session } from '@/shared/contract';
import { problemOf } from './problem';
import { getSession, sessionEnded, sessionStarted } from './session-store';
import type { SessionState } from './session-store';
import { attempt } from './transport';

let refreshing: Promise<boolean> | undefined;

/**
 * Renews the session from the cookie; concurrent callers share one attempt. False: signed out. A server that
 * is busy, broken or out of reach signs nobody out: that throws.
 */
export function refreshSession(): Promise<boolean> {
  refreshing ??= withTabLock(refreshOnce).finally(() => {
    refreshing = undefined;
  });
  return refreshing;
}

async function refreshOnce(): Promise<boolean> {
  const before = getSession();
  // A call that was under way at sign-out must not bring the session back.
  if (before.status === 'out') return false;
  const response = await attempt(paths.refresh(), { method: 'POST' });
  if (response.ok) return taken(sessionSchema.parse(await response.json()), before);
  if (response.status !== 401) throw await problemOf(response);
  if (isStill(before)) sessionEnded(before.status === 'in' ? 'idle' : 'absent');
  return getSession().status === 'in';
}

/** The cookie is the whole browser's: meanwhile this tab may have signed out, or another person signed in. */
function taken(session: Session, before: SessionState): boolean {
  if (!isStill(before)) return getSession().status === 'in';
  if (before.status === 'in' && before.user.id !== session.user.id) {
    sessionEnded('left');
    return false;
  }
  sessionStarted(session);
  return true;
}

const isStill = (before: SessionState): boolean => getSession() === before;

/** Tabs share one cookie: with Web Locks they take turns instead of racing for the rotation. */
function withTabLock(work: () => Promise<boolean>): Promise<boolean> {
  const locks = globalThis.navigator?.locks;
  return locks ? locks.request('landfall.refresh', work) : work();
}
