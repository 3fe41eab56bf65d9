import { mkdirSync, writeFileSync } from 'node:fs';
import { createHash } from 'node:crypto';
import { join } from 'node:path';
import request from 'supertest';
import { PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import { temporaryFolder } from '@/tests/support/temporary-folder';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';

const STYLE = '\n  html, body { height: 100%; }\n';
const SCRIPT = 'globalThis.expo = {};';
const PAGE = `<!doctype html><title>Landfall</title><style id="expo-reset">${STYLE}</style>
<script>${SCRIPT}</script><script src="/_expo/static/js/web/entry-1a2b.js" defer></script>`;

const web = temporaryFolder();
let test: TestApp;
let technician: SignedIn;

beforeAll(async () => {
  mkdirSync(join(web.path, '_expo/static/js/web'), { recursive: true });
  writeFileSync(join(web.path, 'index.html'), PAGE);
  writeFileSync(join(web.path, 'favicon.ico'), 'icon');
  writeFileSync(join(web.path, '_expo/static/js/web/entry-1a2b.js'), 'void 0;');
  test = await startTestApp({ webFolder: web.path, isProduction: true });
  technician = await test.signInAs('technician');
});
afterAll(async () => {
  await test.close();
  web.remove();
});

const sha256 = (text: string): string => `'sha256-${createHash('sha256').update(text).digest('base64')}'`;

describe('problems', () => {
  it('answers an unknown path of the API with a problem that carries the request id', async () => {
    const reply = await request(test.app).get('/api/nowhere');

    expect(reply.status).toBe(404);
    expect(reply.type).toBe('application/problem+json');
    expect(reply.body).toEqual({
      type: `${PROBLEM_TYPE_PREFIX}not-found`,
      title: 'Not found',
      status: 404,
      instance: reply.headers['x-request-id'],
    });
  });

  it.each([
    ['broken JSON', 'application/json', '{"email":', 400, 'bad-request'],
    ['another content type', 'text/plain', 'email=a', 415, 'unsupported-type'],
    ['more than a megabyte', 'application/json', `{"email":"${'a'.repeat(1_100_000)}"}`, 413, 'too-large'],
    ['a broken content encoding', 'application/json; charset=nonsense', '{}', 415, 'unsupported-type'],
  ])('answers %s with its own problem', async (_what, type, body, status, code) => {
    const reply = await request(test.app).post('/api/auth/sign-in').set('Content-Type', type).send(body);

    expect(reply.status).toBe(status);
    expect(reply.body.type).toBe(PROBLEM_TYPE_PREFIX + code);
  });

  it('names the fields that are wrong, by their path', async () => {
    const reply = await request(test.app).post('/api/auth/sign-in').send({ email: 'nobody' });

    expect(reply.status).toBe(422);
    expect(reply.body.errors).toEqual([
      { path: 'email', code: 'invalid_format', message: 'This is not an e-mail address' },
      { path: 'password', code: 'invalid_type', message: expect.any(String) },
    ]);
  });

  it('answers a broken percent sign in a path as a bad request', async () => {
    const reply = await request(test.app).get('/api/auth/links/%E0%A4%A');

    expect(reply.status).toBe(400);
    expect(reply.body.type).toBe(`${PROBLEM_TYPE_PREFIX}bad-request`);
  });

  it('treats an id that cannot exist like one that does not', async () => {
    const administrator = await test.signInAs('administrator');

    const reply = await administrator.post('/api/accounts/7/invitation');

    expect(reply.status).toBe(404);
  });

  it('tells nothing about an error of our own, in the answer or in the log', async () => {
    const administrator = await test.signInAs('administrator');
    const broken = jest.spyOn(test.deps.random, 'token').mockImplementation(() => {
      throw new Error('Value of Mrs Secret');
    });

    const person = { email: 'new@practice.example', displayName: 'New', roles: ['nurse'] };
    const reply = await administrator.post('/api/accounts', person);
    broken.mockRestore();

    expect(reply.status).toBe(500);
    expect(reply.body).toEqual({
      type: `${PROBLEM_TYPE_PREFIX}internal`,
      title: 'Something went wrong on our side',
      status: 500,
      instance: reply.headers['x-request-id'],
    });
    expect(test.log()).toContain('password-link.service.ts');
    expect(test.log()).not.toContain('Mrs Secret');
  });
});

describe('headers', () => {
  it('forbid framing and inline code, but for the hashes of what stands in the page', async () => {
    const reply = await request(test.app).get('/patients/7?eye=right');
    const policy = String(reply.headers['content-security-policy']);
    const directive = (name: string) => policy.split(';').find((part) => part.startsWith(`${name} `));

    expect(directive('default-src')).toBe(`default-src 'self'`);
    expect(directive('script-src')).toBe(`script-src 'self' ${sha256(SCRIPT)}`);
    expect(directive('style-src')).toBe(`style-src 'self' ${sha256('')} ${sha256(STYLE)}`);
    expect(directive('frame-ancestors')).toBe(`frame-ancestors 'none'`);
    expect(directive('object-src')).toBe(`object-src 'none'`);
    expect(policy).not.toContain('unsafe');
    expect(policy).not.toContain('blob:');
    expect(reply.headers['x-content-type-options']).toBe('nosniff');
    expect(reply.headers['referrer-policy']).toBe('no-referrer');
    expect(reply.headers['x-powered-by']).toBeUndefined();
  });

  it('keep every answer of the API out of caches, refusals too', async () => {
    for (const path of ['/api/practice', '/api/accounts', '/api/nowhere']) {
      const reply = await request(test.app).get(path);
      expect(reply.headers['cache-control']).toBe('no-store');
    }
  });
});

describe('the web client', () => {
  it('is the same page at every address, never from a cache', async () => {
    for (const path of ['/', '/patients/7', '/set-password?token=x', '/apiary']) {
      const reply = await request(test.app).get(path);
      expect([reply.status, reply.text, reply.headers['cache-control']]).toEqual([200, PAGE, 'no-cache']);
    }
  });

  it('keeps files with a digest in their name for a year, others not', async () => {
    const hashed = await request(test.app).get('/_expo/static/js/web/entry-1a2b.js');
    const icon = await request(test.app).get('/favicon.ico');

    expect(hashed.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    expect(icon.headers['cache-control']).toBe('no-cache');
  });

  it('does not answer a missing script with the page', async () => {
    expect((await request(test.app).get('/_expo/static/js/web/gone.js')).status).toBe(404);
    expect((await request(test.app).get('/assets/gone.ttf')).status).toBe(404);
  });

  it('cannot be left by the path', async () => {
    const reply = await request(test.app).get('/..%2f..%2fetc/passwd');

    expect(reply.text).not.toContain('root:');
  });
});

describe('health', () => {
  it('says that the process lives and that it can read, write and has its schema', async () => {
    expect((await request(test.app).get('/livez')).status).toBe(200);
    const ready = await request(test.app).get('/readyz');

    expect(ready.status).toBe(200);
    expect(ready.body).toEqual({ status: 'ok', checks: { schema: true, write: true } });
  });
});

describe('the API document', () => {
  it('describes every route with its permission, parameters and problems', async () => {
    const { body } = await request(test.app).get('/api/openapi.json');
    const change = body.paths['/api/accounts/{id}'].put;

    expect(body.openapi).toBe('3.1.0');
    expect(change.description).toBe('Needs: account.manage.');
    expect(change.parameters.map(({ name }: { name: string }) => name).sort()).toEqual(['If-Match', 'id']);
    expect(change.responses.default.content['application/problem+json'].schema).toEqual({
      $ref: '#/components/schemas/Problem',
    });
    expect(body.paths['/api/practice'].get.security).toEqual([]);
  });
});

describe('the log', () => {
  it('has id, route, status and time of each request, and nothing that somebody typed', async () => {
    await request(test.app)
      .post('/api/auth/sign-in')
      .send({ email: 'typed.name@practice.example', password: 'typed-password-text' });
    await request(test.app).get('/api/auth/links/token-in-the-address');
    await request(test.app).get('/patients?search=Searched-Name');
    const reply = await technician.get('/api/accounts?limit=3&after=typed-cursor');

    const lines = test
      .log()
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line) as Record<string, unknown>);
    expect(lines.find(({ requestId }) => requestId === reply.headers['x-request-id'])).toEqual({
      level: 30,
      time: expect.any(String),
      requestId: reply.headers['x-request-id'],
      method: 'GET',
      route: '/api/accounts',
      status: 403,
      ms: expect.any(Number),
      accountId: technician.id,
      msg: 'request',
    });
    for (const typed of [
      'typed.name',
      'typed-password',
      'token-in-the-address',
      'Searched-Name',
      'typed-cursor',
      technician.accessToken,
      technician.displayName,
    ])
      expect(test.log()).not.toContain(typed);
  });
});
