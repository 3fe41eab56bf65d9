import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { PROBLEM_TYPE_PREFIX, type Account, type Role } from '@/shared/contract';
import { AccountModel } from '@/server/db/models/account';
import { auditOf } from '@/tests/support/audit-trail';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let administrator: SignedIn;

beforeAll(async () => {
  test = await startTestApp();
});
beforeEach(async () => {
  administrator = await test.signInAs('administrator');
  test.mailer.sent.length = 0;
});
afterAll(() => test.close());

let people = 0;
const somebody = () => ({
  email: `wanted-${(people += 1)}@practice.example`,
  displayName: 'Wren Pool',
  roles: ['nurse'] as Role[],
});

describe('inviting', () => {
  it('makes an account that waits for its password, mails the link, and notes it', async () => {
    const person = somebody();

    const reply = await administrator.post('/api/accounts', { ...person, email: person.email.toUpperCase() });
    await test.deps.background.idle();

    expect(reply.status).toBe(201);
    expect(reply.body).toEqual({
      ...person,
      id: expect.any(String),
      status: 'invited',
      lastSignInAt: null,
      version: 0,
    });
    expect(reply.headers.location).toBe(`/api/accounts/${reply.body.id}`);
    expect(reply.headers.etag).toBe('"0"');
    expect(test.mailer.sent.map(({ to, subject }) => [to, subject])).toEqual([
      [person.email, 'Your account in Landfall'],
    ]);
    expect((await auditOf('account.invite')).at(-1)).toMatchObject({
      actorId: administrator.id,
      actorName: administrator.displayName,
      nounId: reply.body.id,
      version: 0,
      detail: { email: person.email, roles: ['nurse'] },
    });
  });

  it('refuses an address that has an account already, and mails nothing', async () => {
    const reply = await administrator.post('/api/accounts', { ...somebody(), email: administrator.email });
    await test.deps.background.idle();

    expect(reply.status).toBe(409);
    expect(reply.body.errors).toEqual([
      { path: 'email', code: 'taken', message: 'There is an account with this e-mail address' },
    ]);
    expect(test.mailer.sent).toEqual([]);
  });

  it.each([
    ['roles', { roles: [] }],
    ['roles.0', { roles: ['owner'] }],
    ['email', { email: 'wren' }],
    ['displayName', { displayName: ' ' }],
  ])('refuses wrong %s by the path of the field', async (path, wrong) => {
    const reply = await administrator.post('/api/accounts', { ...somebody(), ...wrong });

    expect(reply.status).toBe(422);
    expect(reply.body.errors[0].path).toBe(path);
  });

  it('can be repeated while the account waits, and only then', async () => {
    const { body: account } = await administrator.post('/api/accounts', somebody());
    const again = await administrator.post(`/api/accounts/${account.id}/invitation`);
    await test.deps.background.idle();

    const forActive = await administrator.post(`/api/accounts/${administrator.id}/invitation`);
    const forNobody = await administrator.post(`/api/accounts/${randomUUID()}/invitation`);

    expect(again.status).toBe(200);
    expect(test.mailer.sent).toHaveLength(2);
    expect(forActive.status).toBe(409);
    expect(forNobody.status).toBe(404);
    expect((await auditOf('account.invite-again')).at(-1)?.nounId).toBe(account.id);
  });
});

describe('changing an account', () => {
  const change = (who: Pick<SignedIn, 'id' | 'displayName'>, changes: Partial<Account>, version = 0) => {
    const body = { displayName: who.displayName, roles: ['nurse'], status: 'active', ...changes };
    return administrator.put(`/api/accounts/${who.id}`, body, version);
  };

  it('changes name and roles, counts the version up, and notes before and after', async () => {
    const nurse = await test.signInAs('nurse');

    const reply = await change(nurse, { displayName: 'Nell Ruddock', roles: ['nurse', 'technician'] });

    expect(reply.status).toBe(200);
    expect(reply.headers.etag).toBe('"1"');
    expect(reply.body).toMatchObject({
      displayName: 'Nell Ruddock',
      roles: ['nurse', 'technician'],
      version: 1,
    });
    expect((await auditOf('account.change')).at(-1)).toMatchObject({
      nounId: nurse.id,
      version: 1,
      detail: {
        before: { displayName: nurse.displayName, roles: ['nurse'], status: 'active' },
        after: { displayName: 'Nell Ruddock', roles: ['nurse', 'technician'], status: 'active' },
      },
    });
  });

  it('ends the sign-ins when the roles change, and not when only the name does', async () => {
    const renamed = await test.signInAs('nurse');
    const promoted = await test.signInAs('nurse');

    await change(renamed, { displayName: 'Nell Ruddock' });
    await change(promoted, { roles: ['surgeon'] });

    expect((await renamed.get('/api/auth/me')).status).toBe(200);
    expect((await promoted.get('/api/auth/me')).status).toBe(401);
  });

  it('ends the sign-ins when the account is disabled, at once', async () => {
    const nurse = await test.signInAs('nurse');

    await change(nurse, { status: 'disabled' });

    expect((await nurse.get('/api/auth/me')).status).toBe(401);
    const back = await change(nurse, { status: 'active' }, 1);
    expect(back.body.status).toBe('active');
    expect((await nurse.get('/api/auth/me')).status).toBe(401);
  });

  it('asks for the version, and refuses an older one with what is stored now', async () => {
    const nurse = await test.signInAs('nurse');
    const body = { displayName: 'First', roles: ['nurse'], status: 'active' };
    const path = `/api/accounts/${nurse.id}`;

    const without = await administrator.put(path, body);
    await administrator.put(path, body, 0);
    const late = await administrator.put(path, { ...body, displayName: 'Second' }, 0);
    const weak = await administrator.put(path, body).set('If-Match', 'W/"1"');

    expect(without.status).toBe(428);
    expect(without.body.type).toBe(`${PROBLEM_TYPE_PREFIX}if-match-required`);
    expect(late.status).toBe(412);
    expect(late.body.current).toMatchObject({ id: nurse.id, displayName: 'First', version: 1 });
    expect(late.body.current.passwordHash).toBeUndefined();
    expect(weak.status).toBe(412);
  });

  it('lets one of two changes at the same time through', async () => {
    const nurse = await test.signInAs('nurse');

    const replies = await Promise.all([
      change(nurse, { displayName: 'First' }),
      change(nurse, { displayName: 'Second' }),
    ]);

    expect(replies.map(({ status }) => status).sort()).toEqual([200, 412]);
  });

  it.each([
    ['active', 'invited', 422],
    ['invited', 'active', 422],
    ['invited', 'disabled', 200],
    ['active', 'disabled', 200],
  ] as const)('from %s to %s answers %i', async (from, to, status) => {
    const person = somebody();
    const account =
      from === 'invited'
        ? ((await administrator.post('/api/accounts', person)).body as Account)
        : await test.signInAs('nurse');

    const reply = await change(account, { status: to });

    expect(reply.status).toBe(status);
    if (status === 422) expect(reply.body.errors[0].path).toBe('status');
  });

  it('is not found for nobody', async () => {
    expect((await change({ id: randomUUID(), displayName: 'Nobody' }, {})).status).toBe(404);
  });
});

describe('the last active administrator', () => {
  beforeEach(async () => {
    const others = { status: 'disabled' as const };
    await AccountModel.update(others, { where: {} });
    administrator = await test.signInAs('administrator');
  });

  const change = (changes: object, version = 0) =>
    administrator.put(
      `/api/accounts/${administrator.id}`,
      { displayName: 'Ada', roles: ['administrator'], status: 'active', ...changes },
      version,
    );

  it.each([
    ['status', { status: 'disabled' }],
    ['roles', { roles: ['surgeon'] }],
  ])('cannot lose the office by %s', async (path, changes) => {
    const reply = await change(changes);

    expect(reply.status).toBe(409);
    expect(reply.body.errors).toEqual([
      { path, code: 'last-administrator', message: 'This is the last active administrator' },
    ]);
    expect((await administrator.get('/api/accounts')).status).toBe(200);
  });

  it('may take on another role, and an invited administrator does not count as a second', async () => {
    await administrator.post('/api/accounts', { ...somebody(), roles: ['administrator'] });

    expect((await change({ displayName: 'Ada Brook' })).status).toBe(200);
    expect((await change({ status: 'disabled' }, 1)).status).toBe(409);
  });

  it('may step back when there is another', async () => {
    await test.signInAs(['administrator', 'surgeon']);

    expect((await change({ status: 'disabled' })).status).toBe(200);
  });
});

describe('the list of accounts', () => {
  it('goes by name in pages, and never shows a password hash', async () => {
    await AccountModel.update({ displayName: 'A. First' }, { where: { id: administrator.id } });
    const first = await administrator.get('/api/accounts?limit=2');
    const all = await administrator.get('/api/accounts?limit=200');
    const second = await administrator.get(`/api/accounts?limit=2&after=${first.body.next}`);

    expect(first.body.items[0]).toEqual({
      id: administrator.id,
      email: administrator.email,
      displayName: 'A. First',
      roles: ['administrator'],
      status: 'active',
      lastSignInAt: null,
      version: 0,
    });
    expect([...first.body.items, ...second.body.items]).toEqual(all.body.items.slice(0, 4));
    expect(all.body.next).toBeUndefined();
    expect(all.text).not.toContain('scrypt');
  });

  it.each(['limit=0', 'limit=201', 'limit=many', 'after=nonsense'])('refuses %s', async (query) => {
    expect((await administrator.get(`/api/accounts?${query}`)).status).toBe(422);
  });

  it('is closed to everybody else, and the attempt is noted', async () => {
    const surgeon = await test.signInAs('surgeon');

    const refused = await surgeon.get('/api/accounts');
    const anonymous = await request(test.app).get('/api/accounts');

    expect(refused.status).toBe(403);
    expect(anonymous.status).toBe(401);
    expect((await auditOf('access.refused')).at(-1)).toMatchObject({
      actorId: surgeon.id,
      noun: 'route',
      detail: { method: 'get', path: '/api/accounts', needs: 'account.manage' },
    });
  });
});

describe('home', () => {
  it('shows the administrator who has not taken up an invitation, and others nothing of it', async () => {
    const person = somebody();
    await administrator.post('/api/accounts', person);
    const nurse = await test.signInAs('nurse');
    const sectionOf = async (who: SignedIn) =>
      (await who.get('/api/home')).body.sections.find(({ id }: { id: string }) => id === 'invited-accounts');

    const section = await sectionOf(administrator);

    expect(section.total).toBe(section.items.length);
    expect(section.items).toContainEqual({
      title: person.displayName,
      detail: person.email,
      href: '/accounts',
      side: null,
    });
    expect(await sectionOf(nurse)).toBeUndefined();
  });
});
