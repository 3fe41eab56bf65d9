import { z } from 'zod';
import type * as storeModule from '@/shared/client/api/session-store';
import type * as clientModule from '@/shared/client/api/client';
import type * as refreshModule from '@/shared/client/api/refresh';
import { problem, startFakeServer } from '@/tests/support/fake-server';
import type { FakeServer } from '@/tests/support/fake-server';
import { aSession, OTHER_PERSON_ID } from '@/tests/support/sessions';

const thing = z.object({ lengthMm: z.number() });
const REFRESH = 'POST /api/auth/refresh';

/** The session is a module's state: each test gets modules of its own. */
function load() {
  const store = jest.requireActual<typeof storeModule>('@/shared/client/api/session-store');
  const client = jest.requireActual<typeof clientModule>('@/shared/client/api/client');
  const { refreshSession } = jest.requireActual<typeof refreshModule>('@/shared/client/api/refresh');
  return { ...store, ...client, refreshSession };
}

let server: FakeServer;
let api: ReturnType<typeof load>;
beforeEach(() => {
  jest.resetModules();
  server = startFakeServer();
  api = load();
});

/** Answers 401 until the token is the new one. */
function onlyForNewToken() {
  server.on('GET /api/thing', ({ headers }) =>
    headers.Authorization === 'Bearer second-token'
      ? { json: { lengthMm: 23.45 } }
      : problem('unauthenticated', 401),
  );
}

describe('a call', () => {
  it('carries the bearer, our own mark, the version and the key', async () => {
    api.sessionStarted(aSession());
    server.on('PUT /api/thing', { json: { lengthMm: 23.45 } });

    await api.call('/api/thing', thing, {
      method: 'PUT',
      body: { a: 1 },
      version: 7,
      idempotencyKey: 'key-12345',
    });

    expect(server.asked[0]).toEqual({
      method: 'PUT',
      path: '/api/thing',
      headers: {
        Accept: 'application/json',
        Authorization: 'Bearer first-token',
        'Content-Type': 'application/json',
        'Idempotency-Key': 'key-12345',
        'If-Match': '"7"',
        'X-Landfall': '1',
      },
      body: { a: 1 },
    });
  });

  it('refuses a reply of another shape instead of using part of it', async () => {
    server.on('GET /api/thing', { json: { lengthMm: '23.45' }, headers: { 'X-Request-Id': 'request-9' } });

    await expect(api.call('/api/thing', thing)).rejects.toMatchObject({
      code: 'unreadable',
      requestId: 'request-9',
    });
  });

  it('refuses a reply that is not JSON', async () => {
    server.on('GET /api/thing', { text: '<html>' });

    await expect(api.call('/api/thing', thing)).rejects.toMatchObject({ code: 'unreadable' });
  });

  it('says that there was no answer, and that trying again may help', async () => {
    server.goOffline();

    await expect(api.call('/api/thing', thing)).rejects.toMatchObject({ code: 'offline', isRetryable: true });
  });

  it('hands over a file under the name that the server gives', async () => {
    server.on('GET /api/file', {
      text: 'a;b',
      headers: {
        'Content-Disposition': `attachment; filename="plan.pdf"; filename*=UTF-8''plan%20r%C3%A9sum%C3%A9.pdf`,
      },
    });

    const { blob, fileName } = await api.callFile('/api/file');

    expect(fileName).toBe('plan résumé.pdf');
    expect(blob.size).toBe(3);
  });
});

describe('an expired token', () => {
  it('is renewed once for all calls that meet it, and each call is repeated', async () => {
    api.sessionStarted(aSession());
    onlyForNewToken();
    server.on(REFRESH, { json: aSession({ accessToken: 'second-token' }) });

    const replies = await Promise.all([1, 2, 3, 4].map(() => api.call('/api/thing', thing)));

    expect(replies).toEqual(Array(4).fill({ lengthMm: 23.45 }));
    expect(server.count(REFRESH)).toBe(1);
  });

  it('ends the session when the cookie is refused, as one that was quiet too long', async () => {
    api.sessionStarted(aSession());
    server.on('GET /api/thing', problem('unauthenticated', 401));
    server.on(REFRESH, problem('unauthenticated', 401));

    await expect(api.call('/api/thing', thing)).rejects.toMatchObject({ code: 'unauthenticated' });

    expect(api.getSession()).toEqual({ status: 'out', why: 'idle' });
  });

  it.each([429, 503])('signs nobody out when the server answers %p', async (status) => {
    api.sessionStarted(aSession());
    server.on('GET /api/thing', problem('unauthenticated', 401));
    server.on(REFRESH, problem('unavailable', status));

    await expect(api.call('/api/thing', thing)).rejects.toMatchObject({ status, isRetryable: true });

    expect(api.getSession().status).toBe('in');
  });

  it('is not repeated for ever', async () => {
    api.sessionStarted(aSession());
    server.on('GET /api/thing', problem('unauthenticated', 401));
    server.on(REFRESH, { json: aSession({ accessToken: 'second-token' }) });

    await expect(api.call('/api/thing', thing)).rejects.toMatchObject({ status: 401 });

    expect(server.count('GET /api/thing')).toBe(2);
  });

  it('never goes on under the name of another person who signed in meanwhile', async () => {
    api.sessionStarted(aSession());
    onlyForNewToken();
    server.on(REFRESH, { json: aSession({ id: OTHER_PERSON_ID, accessToken: 'second-token' }) });

    await expect(api.call('/api/thing', thing)).rejects.toMatchObject({ code: 'unauthenticated' });

    expect(api.getSession().status).toBe('out');
    expect(server.count('GET /api/thing')).toBe(1);
  });

  it('does not bring a session back that was ended while the new token was on its way', async () => {
    api.sessionStarted(aSession());
    onlyForNewToken();
    server.on(REFRESH, () => {
      api.sessionEnded();
      return { json: aSession({ accessToken: 'second-token' }) };
    });

    await expect(api.call('/api/thing', thing)).rejects.toMatchObject({ status: 401 });

    expect(api.getSession().status).toBe('out');
  });

  it('is not renewed at all after sign-out', async () => {
    api.sessionEnded();
    server.on('GET /api/thing', problem('unauthenticated', 401));

    await expect(api.call('/api/thing', thing)).rejects.toMatchObject({ status: 401 });

    expect(server.count(REFRESH)).toBe(0);
  });
});

it('takes turns with other tabs where the browser has locks', async () => {
  const request = jest.fn((_name: string, work: () => Promise<boolean>) => work());
  Object.defineProperty(globalThis.navigator, 'locks', { value: { request }, configurable: true });
  server.on(REFRESH, { json: aSession() });

  await expect(api.refreshSession()).resolves.toBe(true);

  expect(request).toHaveBeenCalledWith('landfall.refresh', expect.any(Function));
  Object.defineProperty(globalThis.navigator, 'locks', { value: undefined, configurable: true });
});
