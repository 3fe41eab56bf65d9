/** Acts of the session: sign in, sign out, find out at start; other tabs of the same browser hear of each. */
import { paths, sessionSchema } from '@/shared/contract';
import { removeOldDrafts } from '@/shared/client/lib/drafts';
import { readStored, writeStored } from '@/shared/client/lib/stored';
import { call, callEmpty } from './client';
import { queryClient } from './query-client';
import { refreshSession } from './refresh';
import { getSession, onSessionChange, sessionEnded, sessionStarted } from './session-store';
import type { WhyOut } from './session-store';

/** Minutes without any act after which the session ends; the server holds the same limit. */
export const IDLE_MINUTES = 15;
const CHANNEL = 'landfall.session';
/** Set while the server has not heard of a sign-out: its cookie would still open the door. */
const UNHEARD_KEY = 'landfall.sign-out-unheard';

type TabMessage = { kind: 'in'; userId: string } | { kind: 'out'; why: WhyOut };

const channel = typeof BroadcastChannel === 'undefined' ? undefined : new BroadcastChannel(CHANNEL);
channel?.addEventListener('message', ({ data }: MessageEvent<TabMessage>) => heard(data));
const tell = (message: TabMessage) => channel?.postMessage(message);

/** What belongs to one person must not be seen by the next: no reply outlives the session it came in. */
onSessionChange(() => {
  if (getSession().status === 'out') queryClient.clear();
});

let leaving: Promise<void> = Promise.resolve();

export async function signIn({ email, password }: { email: string; password: string }): Promise<void> {
  // The reply to a sign-out still under way would take the new session's cookie with it.
  await leaving;
  const session = await call(paths.signIn(), sessionSchema, { method: 'POST', body: { email, password } });
  writeStored(UNHEARD_KEY, null);
  removeOldDrafts();
  queryClient.clear();
  sessionStarted(session);
  tell({ kind: 'in', userId: session.user.id });
}

/** Ends the session here and in other tabs at once, and on the server as soon as it hears of it. */
export function signOut(why: 'left' | 'idle' = 'left'): Promise<void> {
  writeStored(UNHEARD_KEY, '1');
  sessionEnded(why);
  tell({ kind: 'out', why });
  leaving = endOnServer().catch(() => undefined);
  return leaving;
}

async function endOnServer(): Promise<void> {
  await callEmpty(paths.signOut(), { method: 'POST' });
  writeStored(UNHEARD_KEY, null);
}

/** At start: is there a session behind the cookie? A server that does not answer leaves it open. */
export async function resumeSession(): Promise<void> {
  if (getSession().status !== 'unknown') return;
  if (readStored(UNHEARD_KEY) === null) {
    await refreshSession();
    return;
  }
  await endOnServer();
  sessionEnded();
}

/** The cookie is shared: when somebody else signs in elsewhere, this tab must not go on under the old name. */
function heard(message: TabMessage): void {
  const session = getSession();
  if (message.kind === 'out') sessionEnded(message.why);
  else if (session.status === 'in' && session.user.id !== message.userId) sessionEnded('left');
}
