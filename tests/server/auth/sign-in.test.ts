import request from 'supertest';
import { PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import { AccountModel } from '@/server/db/models/account';
import { RefreshSessionModel } from '@/server/db/models/refresh-session';
import { auditOf } from '@/tests/support/audit-trail';
import { openBrowser, sessionCookieOf } from '@/tests/support/browser';
import { MINUTE } from '@/tests/support/fake-clock';
import { startTestApp, TEST_PASSWORD, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let surgeon: SignedIn;

beforeAll(async () => {
  test = await startTestApp();
});
beforeEach(async () => {
  surgeon = await test.signInAs('surgeon');
});
afterAll(() => test.close());

describe('signing in', () => {
  it('gives an access token that works, the person, and a cookie that scripts cannot read', async () => {
    const browser = openBrowser(test.app);

    const reply = await browser.signIn(`  ${surgeon.email.toUpperCase()} `, TEST_PASSWORD);

    const { id, email, displayName } = surgeon;
    expect(reply.status).toBe(200);
    expect(reply.body).toEqual({
      accessToken: expect.any(String),
      expiresInS: 600,
      user: { id, email, displayName, roles: ['surgeon'] },
    });
    expect(sessionCookieOf(reply)).toMatch(
      /^landfall_refresh=[\w-]{43}; Path=\/api\/auth; HttpOnly; SameSite=Strict$/,
    );
    const me = await request(test.app)
      .get('/api/auth/me')
      .set('Authorization', `Bearer ${reply.body.accessToken}`);
    expect(me.status).toBe(200);
  });

  it('stores the digest of the refresh token, not the token', async () => {
    const browser = openBrowser(test.app);
    await browser.signIn(surgeon.email, TEST_PASSWORD);

    const rows = await RefreshSessionModel.findAll({ where: { accountId: surgeon.id } });

    expect(JSON.stringify(rows)).not.toContain(browser.cookie);
    expect(rows.at(-1)?.tokenHash).toMatch(/^[0-9a-f]{64}$/);
  });

  it('notes when, without counting as a change of the account, and leaves an audit entry', async () => {
    await openBrowser(test.app).signIn(surgeon.email, TEST_PASSWORD);

    const account = await AccountModel.findByPk(surgeon.id, { rejectOnEmpty: true });
    const entries = await auditOf('session.start');

    expect(account.lastSignInAt).toBe(test.clock.now().toISOString());
    expect(account.version).toBe(0);
    expect(entries.at(-1)).toMatchObject({
      actorId: surgeon.id,
      noun: 'session',
      requestId: expect.any(String),
    });
  });

  it.each([
    ['a wrong password', async () => surgeon.email, 'wrong password'],
    ['an unknown address', async () => 'nobody@practice.example', 'no such account'],
    [
      'a disabled account',
      async () => {
        await AccountModel.update({ status: 'disabled' }, { where: { id: surgeon.id } });
        return surgeon.email;
      },
      'disabled',
    ],
  ])('refuses %s in the same words, and says why in the audit trail only', async (_what, emailOf, reason) => {
    const email = await emailOf();
    const password = reason === 'wrong password' ? 'not the password' : TEST_PASSWORD;

    const reply = await openBrowser(test.app).signIn(email, password);

    expect(reply.status).toBe(401);
    expect(reply.body).toEqual({
      type: `${PROBLEM_TYPE_PREFIX}wrong-credentials`,
      title: 'E-mail and password do not match an active account',
      status: 401,
      instance: expect.any(String),
    });
    expect(sessionCookieOf(reply)).toBeUndefined();
    expect((await auditOf('session.refused')).at(-1)?.detail).toEqual({ reason, attemptsLeft: 4 });
  });

  it('is refused when the account is disabled while the password is being checked', async () => {
    const signingIn = openBrowser(test.app).signIn(surgeon.email, TEST_PASSWORD);
    await new Promise((resolve) => setTimeout(resolve, 60));
    await AccountModel.update({ status: 'disabled' }, { where: { id: surgeon.id } });

    expect((await signingIn).status).toBe(401);
  });

  it('spends a password hash on an unknown address too', async () => {
    const time = async (email: string): Promise<number> => {
      const startMs = performance.now();
      await openBrowser(test.app).signIn(email, 'some password');
      return performance.now() - startMs;
    };

    const knownMs = await time(surgeon.email);
    const unknownMs = await time('unknown@practice.example');

    expect(unknownMs).toBeGreaterThan(knownMs * 0.5);
  });

  it('marks the cookie as secure behind a proxy that speaks https, and believes no other', async () => {
    const signInOverHttps = (email: string) =>
      request(test.app)
        .post('/api/auth/sign-in')
        .set('X-Forwarded-Proto', 'https')
        .send({ email, password: TEST_PASSWORD });

    const direct = await signInOverHttps(surgeon.email);
    test.app.set('trust proxy', 1);
    const behindProxy = await signInOverHttps(surgeon.email);
    test.app.set('trust proxy', 0);

    expect(sessionCookieOf(direct)).not.toContain('Secure');
    expect(sessionCookieOf(behindProxy)).toContain('; Secure');
  });
});

describe('guessing', () => {
  it('is stopped after five attempts for this account and address, with the time to wait', async () => {
    const browser = openBrowser(test.app);
    for (let guess = 0; guess < 5; guess += 1) await browser.signIn(surgeon.email, `guess ${guess}`);

    const stopped = await browser.signIn(surgeon.email, TEST_PASSWORD);
    const colleague = await test.signInAs('nurse');
    const other = await browser.signIn(colleague.email, TEST_PASSWORD);
    test.clock.advance(15 * MINUTE);
    const later = await browser.signIn(surgeon.email, TEST_PASSWORD);

    expect(stopped.status).toBe(429);
    expect(stopped.body.type).toBe(`${PROBLEM_TYPE_PREFIX}too-many-requests`);
    expect(stopped.headers['retry-after']).toBe('900');
    expect(other.status).toBe(200);
    expect(later.status).toBe(200);
  });

  it('starts anew after the right password', async () => {
    const browser = openBrowser(test.app);
    for (let guess = 0; guess < 4; guess += 1) await browser.signIn(surgeon.email, `guess ${guess}`);
    await browser.signIn(surgeon.email, TEST_PASSWORD);

    const reply = await browser.signIn(surgeon.email, 'guess again');

    expect(reply.status).toBe(401);
  });

  it('cannot be made faster by guessing in parallel', async () => {
    const guesses = Array.from({ length: 8 }, (_, guess) =>
      openBrowser(test.app).signIn(surgeon.email, `${guess}`),
    );

    const statuses = (await Promise.all(guesses)).map(({ status }) => status).sort();

    expect(statuses).toEqual([401, 401, 401, 401, 401, 429, 429, 429]);
  });
});
