import request from 'supertest';
import { PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import { AccountModel } from '@/server/db/models/account';
import { PasswordLinkModel } from '@/server/db/models/password-link';
import { auditOf } from '@/tests/support/audit-trail';
import { openBrowser } from '@/tests/support/browser';
import { HOUR, SECOND } from '@/tests/support/fake-clock';
import { startTestApp, TEST_PASSWORD, type SignedIn, type TestApp } from '@/tests/support/test-app';

const NEW_PASSWORD = 'four gulls on a mooring';

let test: TestApp;
let person: SignedIn;

beforeAll(async () => {
  test = await startTestApp();
});
beforeEach(async () => {
  person = await test.signInAs('counsellor');
  test.mailer.sent.length = 0;
});
afterAll(() => test.close());

const askForReset = (email: string) => request(test.app).post('/api/auth/password-reset').send({ email });
const open = (token: string) => request(test.app).get(`/api/auth/links/${token}`);
const setPassword = (token: string, password = NEW_PASSWORD) =>
  request(test.app).post(`/api/auth/links/${token}`).send({ password });

async function newestToken(): Promise<string> {
  await test.deps.background.idle();
  const mail = test.mailer.sent.at(-1);
  return /\/set-password\?token=([\w-]+)/.exec(mail?.text ?? '')?.[1] ?? 'no mail';
}

async function resetToken(): Promise<string> {
  await askForReset(person.email);
  return newestToken();
}

async function invite(email: string): Promise<{ id: string; token: string; administrator: SignedIn }> {
  const administrator = await test.signInAs('administrator');
  const reply = await administrator.post('/api/accounts', {
    email,
    displayName: 'Zoë Tide',
    roles: ['nurse'],
  });
  return { id: reply.body.id, token: await newestToken(), administrator };
}

describe('asking for a new password', () => {
  it('mails a link on the address of the service', async () => {
    const reply = await askForReset(person.email);
    await test.deps.background.idle();

    expect(reply.status).toBe(204);
    expect(test.mailer.sent).toEqual([
      {
        to: person.email,
        subject: 'A new password for Landfall',
        text: expect.stringMatching(/^http:\/\/localhost:3000\/set-password\?token=[\w-]{43}$/m),
      },
    ]);
    expect((await auditOf('account.reset-request')).at(-1)?.nounId).toBe(person.id);
  });

  it('does not take the address of the link from the request', async () => {
    await askForReset(person.email)
      .set('Host', 'elsewhere.example')
      .set('X-Forwarded-Host', 'elsewhere.example');
    await test.deps.background.idle();

    expect(test.mailer.sent[0]?.text).not.toContain('elsewhere');
  });

  it('answers the same for an unknown address and a disabled account, and mails nothing', async () => {
    await AccountModel.update({ status: 'disabled' }, { where: { id: person.id } });

    const replies = [await askForReset('stranger@practice.example'), await askForReset(person.email)];
    await test.deps.background.idle();

    expect(replies.map(({ status, text }) => [status, text])).toEqual([
      [204, ''],
      [204, ''],
    ]);
    expect(test.mailer.sent).toEqual([]);
  });

  it('is slowed down', async () => {
    for (let time = 0; time < 5; time += 1) await askForReset(person.email);

    expect((await askForReset(person.email)).status).toBe(429);
  });
});

describe('a reset link', () => {
  it('says whose it is', async () => {
    const reply = await open(await resetToken());

    expect(reply.status).toBe(200);
    expect(reply.body).toEqual({
      kind: 'reset',
      email: person.email,
      displayName: person.displayName,
      expiresAt: new Date(test.clock.now().getTime() + HOUR).toISOString(),
    });
  });

  it('sets the password once, and ends every sign-in of the account', async () => {
    const browser = openBrowser(test.app);
    await browser.signIn(person.email, TEST_PASSWORD);
    const token = await resetToken();

    const reply = await setPassword(token);

    expect(reply.status).toBe(204);
    expect((await browser.refresh()).status).toBe(401);
    expect((await person.get('/api/auth/me')).status).toBe(401);
    expect((await browser.signIn(person.email, TEST_PASSWORD)).status).toBe(401);
    expect((await browser.signIn(person.email, NEW_PASSWORD)).status).toBe(200);
    expect((await auditOf('account.set-password')).at(-1)).toMatchObject({
      actorId: person.id,
      nounId: person.id,
      detail: { by: 'reset' },
    });

    const again = await setPassword(token);
    expect(again.status).toBe(410);
    expect(again.body.type).toBe(`${PROBLEM_TYPE_PREFIX}link-expired`);
  });

  it('sets the password once when it is used twice at the same time', async () => {
    const token = await resetToken();

    const replies = await Promise.all([setPassword(token), setPassword(token, 'another pier at low tide')]);

    expect(replies.map(({ status }) => status).sort()).toEqual([204, 410]);
  });

  it('expires after an hour', async () => {
    const token = await resetToken();
    test.clock.advance(HOUR - SECOND);
    expect((await open(token)).status).toBe(200);
    test.clock.advance(SECOND);

    expect((await open(token)).status).toBe(410);
    expect((await setPassword(token)).status).toBe(410);
  });

  it('no longer works when a newer one was asked for', async () => {
    const older = await resetToken();
    const newer = await resetToken();

    expect((await open(older)).status).toBe(410);
    expect((await open(newer)).status).toBe(200);
  });

  it('is stored as a digest only', async () => {
    const token = await resetToken();

    const rows = await PasswordLinkModel.findAll({ where: { accountId: person.id } });

    expect(JSON.stringify(rows)).not.toContain(token);
  });

  it.each([
    ['too short', 'fourteen chars'],
    ['repeats too few signs', 'abababababababab'],
    ['is the address', () => person.email],
    ['is printed in the demonstration', 'keeper-of-the-light'],
  ])('refuses a password that %s, and stays open', async (_what, password) => {
    const token = await resetToken();

    const reply = await setPassword(token, typeof password === 'string' ? password : password());

    expect(reply.status).toBe(422);
    expect(reply.body.errors[0].path).toBe('password');
    expect((await open(token)).status).toBe(200);
  });

  it('that nobody made is answered like one that was used', async () => {
    expect((await open('made-up')).status).toBe(410);
    expect((await setPassword('made-up')).status).toBe(410);
  });
});

describe('an invitation', () => {
  it('makes the account active when the password is set', async () => {
    const { id, token } = await invite('invited@practice.example');

    expect((await open(token)).body.kind).toBe('invitation');
    expect((await setPassword(token)).status).toBe(204);

    const signedIn = await openBrowser(test.app).signIn('invited@practice.example', NEW_PASSWORD);
    expect(signedIn.body.user).toEqual({
      id,
      email: 'invited@practice.example',
      displayName: 'Zoë Tide',
      roles: ['nurse'],
    });
  });

  it('holds for 72 hours', async () => {
    const { token } = await invite('slow@practice.example');
    test.clock.advance(72 * HOUR - SECOND);
    expect((await open(token)).status).toBe(200);
    test.clock.advance(SECOND);

    expect((await open(token)).status).toBe(410);
  });

  it('is worth nothing once the account is disabled', async () => {
    const { id, token, administrator } = await invite('gone@practice.example');
    const change = { displayName: 'Zoë Tide', roles: ['nurse'], status: 'disabled' };

    await administrator.put(`/api/accounts/${id}`, change, 0);

    expect((await open(token)).status).toBe(410);
    expect((await setPassword(token)).status).toBe(410);
  });

  it('cannot be replaced by asking for a reset', async () => {
    const { token } = await invite('eager@practice.example');
    test.mailer.sent.length = 0;

    await askForReset('eager@practice.example');
    await test.deps.background.idle();

    expect(test.mailer.sent).toEqual([]);
    expect((await open(token)).status).toBe(200);
  });
});
