import type * as storeModule from '@/shared/client/api/session-store';
import type * as sessionModule from '@/shared/client/api/session';
import type * as queryModule from '@/shared/client/api/query-client';
import { problem, startFakeServer } from '@/tests/support/fake-server';
import type { FakeServer } from '@/tests/support/fake-server';
import { aSession, OTHER_PERSON_ID } from '@/tests/support/sessions';

const CREDENTIALS = { email: 'ada@practice.example', password: 'four quiet words here' };
const SIGN_IN = 'POST /api/auth/sign-in';
const SIGN_OUT = 'POST /api/auth/sign-out';
const REFRESH = 'POST /api/auth/refresh';

/** What the tabs of a browser tell each other. */
class FakeChannel {
  static posted: unknown[] = [];
  static hear: (message: unknown) => void = () => undefined;
  addEventListener(_type: 'message', listener: (event: { data: unknown }) => void) {
    FakeChannel.hear = (data) => listener({ data });
  }
  postMessage(message: unknown) {
    FakeChannel.posted.push(message);
  }
}

/** The session is a module's state: each test gets modules of its own. */
function load() {
  const store = jest.requireActual<typeof storeModule>('@/shared/client/api/session-store');
  const session = jest.requireActual<typeof sessionModule>('@/shared/client/api/session');
  const { queryClient } = jest.requireActual<typeof queryModule>('@/shared/client/api/query-client');
  return { ...store, ...session, queryClient };
}

let server: FakeServer;
let api: ReturnType<typeof load>;
beforeEach(() => {
  jest.resetModules();
  FakeChannel.posted = [];
  Object.assign(globalThis, { BroadcastChannel: FakeChannel });
  server = startFakeServer();
  server.on(SIGN_IN, { json: aSession() });
  server.on(SIGN_OUT, { status: 204 });
  api = load();
});

describe('signing in', () => {
  it('keeps the person and the token, and tells the other tabs who it is', async () => {
    await api.signIn(CREDENTIALS);

    expect(api.getSession()).toMatchObject({
      status: 'in',
      accessToken: 'first-token',
      user: aSession().user,
    });
    expect(FakeChannel.posted).toEqual([{ kind: 'in', userId: aSession().user.id }]);
  });

  it('keeps the token out of the browser storage', async () => {
    await api.signIn(CREDENTIALS);

    expect(JSON.stringify({ ...localStorage, ...sessionStorage })).not.toContain('first-token');
  });

  it('starts with nothing that an earlier person loaded', async () => {
    api.queryClient.setQueryData(['patients'], ['Earlier, Patient']);

    await api.signIn(CREDENTIALS);

    expect(api.queryClient.getQueryData(['patients'])).toBeUndefined();
  });

  it('waits for a sign-out that is under way, whose reply would take the new cookie with it', async () => {
    const order: string[] = [];
    await api.signIn(CREDENTIALS);
    server.on(SIGN_OUT, async () => {
      await new Promise((resolve) => setTimeout(resolve, 20));
      order.push('out');
      return { status: 204 };
    });
    server.on(SIGN_IN, () => {
      order.push('in');
      return { json: aSession() };
    });

    void api.signOut();
    await api.signIn(CREDENTIALS);

    expect(order).toEqual(['out', 'in']);
    expect(api.getSession().status).toBe('in');
  });
});

describe('signing out', () => {
  it('ends the session at once, forgets what was loaded and tells the other tabs', async () => {
    await api.signIn(CREDENTIALS);
    api.queryClient.setQueryData(['patients'], ['Quill, Ada']);

    const heard = api.signOut();

    expect(api.getSession().status).toBe('out');
    expect(api.queryClient.getQueryData(['patients'])).toBeUndefined();
    expect(FakeChannel.posted.at(-1)).toEqual({ kind: 'out', why: 'left' });
    await heard;
    expect(server.count(SIGN_OUT)).toBe(1);
  });

  it('that the server could not hear is made up for before anybody else gets in by the old cookie', async () => {
    await api.signIn(CREDENTIALS);
    server.on(SIGN_OUT, problem('unavailable', 503));
    await api.signOut();

    jest.resetModules();
    const reloaded = load();
    server.on(SIGN_OUT, { status: 204 });
    await reloaded.resumeSession();

    expect(reloaded.getSession().status).toBe('out');
    expect(server.count(SIGN_OUT)).toBe(2);
    expect(server.count(REFRESH)).toBe(0);
  });

  it('that was heard leaves the next start as usual', async () => {
    await api.signIn(CREDENTIALS);
    await api.signOut();
    server.on(REFRESH, { json: aSession() });

    jest.resetModules();
    const reloaded = load();
    await reloaded.resumeSession();

    expect(server.count(REFRESH)).toBe(1);
  });
});

describe('the start', () => {
  it('finds the session behind the cookie', async () => {
    server.on(REFRESH, { json: aSession() });

    await api.resumeSession();

    expect(api.getSession()).toMatchObject({ status: 'in', user: { displayName: 'Ada Quill' } });
  });

  it('without a session is simply out, not idle', async () => {
    server.on(REFRESH, problem('unauthenticated', 401));

    await api.resumeSession();

    expect(api.getSession()).toEqual({ status: 'out', why: 'absent' });
  });

  it('stays open when the server does not answer', async () => {
    server.goOffline();

    await expect(api.resumeSession()).rejects.toMatchObject({ code: 'offline' });

    expect(api.getSession().status).toBe('unknown');
  });
});

describe('another tab', () => {
  it('that signs out takes this one with it, and says why', async () => {
    await api.signIn(CREDENTIALS);

    FakeChannel.hear({ kind: 'out', why: 'idle' });

    expect(api.getSession()).toEqual({ status: 'out', why: 'idle' });
  });

  it('where another person signs in ends the session of this one', async () => {
    await api.signIn(CREDENTIALS);

    FakeChannel.hear({ kind: 'in', userId: OTHER_PERSON_ID });

    expect(api.getSession().status).toBe('out');
  });

  it('where the same person signs in changes nothing', async () => {
    await api.signIn(CREDENTIALS);

    FakeChannel.hear({ kind: 'in', userId: aSession().user.id });

    expect(api.getSession().status).toBe('in');
  });
});
