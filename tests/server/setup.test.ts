import request from 'supertest';
import { PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import { SettingModel } from '@/server/db/models/setting';
import { makeFirstAdministratorCode } from '@/server/features/practice/first-administrator.service';
import { auditOf } from '@/tests/support/audit-trail';
import { openBrowser } from '@/tests/support/browser';
import { MINUTE } from '@/tests/support/fake-clock';
import { startTestApp, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let code: string;

beforeAll(async () => {
  test = await startTestApp();
  code = (await makeFirstAdministratorCode(test.deps)) ?? 'none';
});
afterAll(() => test.close());

const PASSWORD = 'first light over the bar';
const setUp = (changes: object = {}) =>
  request(test.app)
    .post('/api/setup')
    .send({
      code,
      email: 'first@practice.example',
      displayName: 'Ada Brook',
      password: PASSWORD,
      ...changes,
    });
const practice = async () => (await request(test.app).get('/api/practice')).body;

describe('setting up an empty practice', () => {
  it('says that it is needed, and prints a code that the database does not hold', async () => {
    expect((await practice()).needsFirstAdministrator).toBe(true);
    expect(code).toMatch(/^([0-9a-f]{5}-){3}[0-9a-f]{5}$/);
    expect(JSON.stringify(await SettingModel.findAll())).not.toContain(code);
  });

  it('makes a new code at each start, and the old one is worth nothing', async () => {
    const old = code;
    code = (await makeFirstAdministratorCode(test.deps)) ?? 'none';

    expect(code).not.toBe(old);
    expect((await setUp({ code: old })).status).toBe(403);
  });

  it('refuses a wrong code, and slows guessing down', async () => {
    const guesses = [1, 2, 3, 4].map((guess) => setUp({ code: `0000${guess}-00000-00000-00000` }));
    const statuses = (await Promise.all(guesses)).map(({ status }) => status);
    const stopped = await setUp();
    test.clock.advance(15 * MINUTE);

    expect(statuses).toEqual([403, 403, 403, 403]);
    expect(stopped.status).toBe(429);
  });

  it('refuses a weak password by the path of the field', async () => {
    const reply = await setUp({ password: 'aaaaaaaaaaaaaaaaaaaa' });

    expect(reply.status).toBe(422);
    expect(reply.body.errors[0].path).toBe('password');
    expect((await practice()).needsFirstAdministrator).toBe(true);
  });

  it('makes the administrator once, who can sign in', async () => {
    const replies = await Promise.all([setUp(), setUp({ email: 'second@practice.example' })]);

    const made = replies.find(({ status }) => status === 201);
    expect(replies.map(({ status }) => status).sort()).toEqual([201, 409]);
    expect(made?.body).toMatchObject({ roles: ['administrator'], status: 'active' });
    expect((await practice()).needsFirstAdministrator).toBe(false);
    expect((await auditOf('account.first-administrator')).map(({ nounId }) => nounId)).toEqual([
      made?.body.id,
    ]);
    const signedIn = await openBrowser(test.app).signIn(made?.body.email, PASSWORD);
    expect(signedIn.status).toBe(200);
  });

  it('is closed afterwards, and no start makes another code', async () => {
    const reply = await setUp({ email: 'third@practice.example' });

    expect(reply.status).toBe(409);
    expect(reply.body.type).toBe(`${PROBLEM_TYPE_PREFIX}conflict`);
    expect(await makeFirstAdministratorCode(test.deps)).toBeUndefined();
  });
});
