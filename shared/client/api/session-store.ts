/**
 * Who is signed in, outside React: Back and Forward may remount the whole tree, and the session must not be
 * lost with it. The access token lives in memory only; the refresh cookie is the server's.
 */
import { useSyncExternalStore } from 'react';
import type { Session, SessionUser } from '@/shared/contract';

/** `absent`: there was none, or it is no longer valid; `idle`: too long without an act; `left`: signed out on purpose. */
export type WhyOut = 'absent' | 'idle' | 'left';

export type SessionState =
  | { status: 'unknown' }
  | { status: 'out'; why: WhyOut }
  | { status: 'in'; user: SessionUser; accessToken: string; endsAtMs: number };

let state: SessionState = { status: 'unknown' };
const listeners = new Set<() => void>();

export const getSession = (): SessionState => state;

function set(next: SessionState): void {
  state = next;
  listeners.forEach((listener) => listener());
}

export function sessionStarted(session: Session): void {
  set({
    status: 'in',
    user: session.user,
    accessToken: session.accessToken,
    endsAtMs: Date.now() + session.expiresInS * 1000,
  });
}

export function sessionEnded(why: WhyOut = 'absent'): void {
  // Several tabs and calls may learn of the same end; the first one knew why.
  if (state.status !== 'out') set({ status: 'out', why });
}

export function onSessionChange(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useSession(): SessionState {
  return useSyncExternalStore(onSessionChange, getSession, getSession);
}

/** The signed-in person; only for screens behind the gate. */
export function useUser(): SessionUser {
  const session = useSession();
  if (session.status !== 'in') throw new Error('This screen stands behind the sign-in gate');
  return session.user;
}
