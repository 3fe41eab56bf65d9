import request from 'supertest';
import { PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import { auditOf } from '@/tests/support/audit-trail';
import { openBrowser, ORIGIN, sessionCookieOf, type Browser } from '@/tests/support/browser';
import { HOUR, MINUTE, SECOND } from '@/tests/support/fake-clock';
import { startTestApp, TEST_PASSWORD, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let person: SignedIn;
let browser: Browser;

beforeAll(async () => {
  test = await startTestApp();
});
beforeEach(async () => {
  person = await test.signInAs('technician');
  browser = openBrowser(test.app);
  await browser.signIn(person.email, TEST_PASSWORD);
});
afterAll(() => test.close());

/** Another holder of the same cookie: a second tab, or a thief. */
const copyOf = ({ cookie }: Browser): Browser => openBrowser(test.app, cookie);
const me = (accessToken: string) =>
  request(test.app).get('/api/auth/me').set('Authorization', `Bearer ${accessToken}`);

describe('refreshing', () => {
  it('gives a new access token and the next refresh token', async () => {
    const before = browser.cookie;
    const reply = await browser.refresh();

    expect(reply.status).toBe(200);
    expect(reply.body.user.id).toBe(person.id);
    expect(browser.cookie).toMatch(/^[\w-]{43}$/);
    expect(browser.cookie).not.toBe(before);
    expect((await me(reply.body.accessToken)).status).toBe(200);
  });

  it('lets two tabs present the same token at once, and both go on', async () => {
    const otherTab = copyOf(browser);

    const replies = await Promise.all([browser.refresh(), otherTab.refresh()]);
    test.clock.advance(MINUTE);
    const next = [await browser.refresh(), await otherTab.refresh()];

    expect(replies.map(({ status }) => status)).toEqual([200, 200]);
    expect(next.map(({ status }) => status)).toEqual([200, 200]);
  });

  it('takes a used token for stolen after 30 seconds, and ends the whole sign-in', async () => {
    const thief = copyOf(browser);
    const reply = await browser.refresh();
    test.clock.advance(30 * SECOND);
    expect((await copyOf(thief).refresh()).status).toBe(200);
    test.clock.advance(SECOND);

    const stolen = await thief.refresh();
    const honest = await browser.refresh();

    expect([stolen.status, honest.status]).toEqual([401, 401]);
    expect((await me(reply.body.accessToken)).status).toBe(401);
    expect((await auditOf('session.reused')).at(-1)?.detail).toEqual({ accountId: person.id });
  });

  it('never touches the cookie when it refuses: another tab may have put a newer one there', async () => {
    const late = copyOf(browser);
    await browser.refresh();
    test.clock.advance(31 * SECOND);

    const refused = await late.refresh();

    expect(refused.status).toBe(401);
    expect(sessionCookieOf(refused)).toBeUndefined();
  });

  it('leaves other sign-ins of the same person alone when one is taken for stolen', async () => {
    const otherComputer = openBrowser(test.app);
    await otherComputer.signIn(person.email, TEST_PASSWORD);
    const thief = copyOf(browser);
    await browser.refresh();
    test.clock.advance(MINUTE);

    await thief.refresh();

    expect((await otherComputer.refresh()).status).toBe(200);
  });

  it.each(['no cookie', 'a made-up cookie'])('is refused with %s', async (what) => {
    const stranger = openBrowser(test.app, what === 'no cookie' ? undefined : 'a'.repeat(43));

    const reply = await stranger.refresh();

    expect(reply.status).toBe(401);
    expect(reply.body.type).toBe(`${PROBLEM_TYPE_PREFIX}unauthenticated`);
  });
});

describe('the end of a sign-in', () => {
  it('comes after 15 minutes without any use', async () => {
    test.clock.advance(15 * MINUTE);
    expect((await browser.refresh()).status).toBe(200);

    test.clock.advance(15 * MINUTE + SECOND);
    expect((await browser.refresh()).status).toBe(401);
  });

  it('is put off by use of the API, not only by refreshing', async () => {
    const { accessToken } = (await browser.refresh()).body;
    test.clock.advance(9 * MINUTE);
    await me(accessToken);
    test.clock.advance(10 * MINUTE);

    expect((await browser.refresh()).status).toBe(200);
  });

  it('comes after 12 hours however much it is used', async () => {
    const statuses: number[] = [];
    for (let quarter = 0; quarter < 12 * 6 + 1; quarter += 1) {
      test.clock.advance(10 * MINUTE);
      statuses.push((await browser.refresh()).status);
    }

    expect(statuses.slice(0, 71)).toEqual(Array(71).fill(200));
    expect(statuses.slice(71)).toEqual([401, 401]);
    expect(12 * HOUR).toBe(72 * 10 * MINUTE);
  });

  it('comes with signing out: cookie gone, refresh token and access token worthless', async () => {
    const { accessToken } = (await browser.refresh()).body;
    const kept = copyOf(browser);

    const reply = await browser.signOut();

    expect(reply.status).toBe(204);
    expect(sessionCookieOf(reply)).toMatch(/^landfall_refresh=; Path=\/api\/auth; Expires=Thu, 01 Jan 1970/);
    expect((await kept.refresh()).status).toBe(401);
    expect((await me(accessToken)).status).toBe(401);
    expect((await auditOf('session.end')).at(-1)).toMatchObject({ actorId: person.id, noun: 'session' });
  });

  it('can be asked for twice', async () => {
    await browser.signOut();

    expect((await browser.signOut()).status).toBe(204);
  });
});

describe('a foreign page', () => {
  const ask = (path: string, headers: Record<string, string>) =>
    request(test.app).post(path).set('Cookie', `landfall_refresh=${browser.cookie}`).set(headers);

  it.each([
    ['without Origin', { 'X-Landfall': '1' }],
    ['without the header', { Origin: ORIGIN }],
    ['with another Origin', { Origin: 'https://elsewhere.example', 'X-Landfall': '1' }],
    ['with Origin null', { Origin: 'null', 'X-Landfall': '1' }],
  ])('can neither refresh nor sign out %s', async (_how, headers) => {
    const statuses = [await ask('/api/auth/refresh', headers), await ask('/api/auth/sign-out', headers)].map(
      ({ status }) => status,
    );

    expect(statuses).toEqual([403, 403]);
    expect((await browser.refresh()).status).toBe(200);
  });
});
