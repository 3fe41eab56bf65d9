/** Acts of the session: sign in, sign out, find out at start, end when idle. */
import { paths, sessionSchema } from '@/shared/contract';
import { call, callEmpty, refreshSession } from './client';
import { queryClient } from './query-client';
import { getSession, sessionEnded, sessionStarted } from './session-store';

/** Minutes without any act after which the session ends; the server holds the same limit. */
export const IDLE_MINUTES = 15;
const CHANNEL = 'landfall.session';

const channel = typeof BroadcastChannel === 'undefined' ? undefined : new BroadcastChannel(CHANNEL);
channel?.addEventListener('message', () => {
  queryClient.clear();
  sessionEnded();
});

export async function signIn(credentials: { email: string; password: string }): Promise<void> {
  queryClient.clear();
  sessionStarted(await call(paths.signIn(), sessionSchema, { method: 'POST', body: credentials }));
}

/** Ends the session here, in other tabs and on the server. */
export async function signOut(wasIdle = false): Promise<void> {
  await callEmpty(paths.signOut(), { method: 'POST' }).catch(() => undefined);
  queryClient.clear();
  sessionEnded(wasIdle);
  channel?.postMessage('out');
}

/** At start: is there a session behind the cookie? A server that does not answer leaves it open. */
export async function resumeSession(): Promise<void> {
  if (getSession().status !== 'unknown') return;
  await refreshSession();
}
