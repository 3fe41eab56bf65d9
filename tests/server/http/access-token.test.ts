import { createHmac } from 'node:crypto';
import { sign } from 'jsonwebtoken';
import request from 'supertest';
import { PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import { MINUTE, SECOND } from '@/tests/support/fake-clock';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let nurse: SignedIn;
let claims: { sub: string; sid: string; iat: number; exp: number; iss: string; aud: string };

beforeAll(async () => {
  test = await startTestApp();
});
beforeEach(async () => {
  nurse = await test.signInAs('nurse');
  claims = JSON.parse(Buffer.from(nurse.accessToken.split('.')[1] ?? '', 'base64url').toString());
});
afterAll(() => test.close());

const ask = (token: string) => request(test.app).get('/api/auth/me').set('Authorization', `Bearer ${token}`);
const encode = (value: object): string => Buffer.from(JSON.stringify(value)).toString('base64url');

const without = (name: string): object =>
  Object.fromEntries(Object.entries(claims).filter(([key]) => key !== name));

describe('access token', () => {
  it('lets its owner in, and names no roles or names itself', async () => {
    const reply = await nurse.get('/api/auth/me');

    expect(reply.status).toBe(200);
    expect(reply.body).toEqual({
      id: nurse.id,
      email: nurse.email,
      displayName: nurse.displayName,
      roles: ['nurse'],
    });
    expect(Object.keys(claims).sort()).toEqual(['aud', 'exp', 'iat', 'iss', 'sid', 'sub']);
  });

  it('ends after ten minutes', async () => {
    test.clock.advance(10 * MINUTE - SECOND);
    expect((await nurse.get('/api/auth/me')).status).toBe(200);
    test.clock.advance(SECOND);
    const reply = await nurse.get('/api/auth/me');

    expect(reply.status).toBe(401);
    expect(reply.body.type).toBe(`${PROBLEM_TYPE_PREFIX}unauthenticated`);
    expect(reply.headers['www-authenticate']).toBe('Bearer');
  });

  it.each<[string, (secret: string) => string]>([
    ['another secret', () => sign(claims, 'another secret')],
    ['no signature', () => `${encode({ alg: 'none', typ: 'JWT' })}.${encode(claims)}.`],
    ['another algorithm', (secret) => sign(claims, secret, { algorithm: 'HS512' })],
    ['another issuer', (secret) => sign({ ...claims, iss: 'somebody' }, secret)],
    ['another audience', (secret) => sign({ ...claims, aud: 'something' }, secret)],
    ['no end', (secret) => sign(without('exp'), secret)],
    ['no sign-in', (secret) => sign(without('sid'), secret)],
    ['a sign-in that never was', (secret) => sign({ ...claims, sid: 'x' }, secret)],
    ['nobody', (secret) => sign({ ...claims, sub: 'x' }, secret)],
    ['no token at all', () => ''],
  ])('is refused with %s', async (_what, forge) => {
    expect((await ask(forge(test.deps.tokenSecret))).status).toBe(401);
  });

  it('is refused with changed content under the old signature', async () => {
    const [header, , signature] = nurse.accessToken.split('.');
    const other = await test.signInAs('administrator');

    expect((await ask(`${header}.${encode({ ...claims, sub: other.id })}.${signature}`)).status).toBe(401);
  });

  it('would be accepted if it were forged with the secret: the forgeries above fail for their own reasons', async () => {
    const content = `${encode({ alg: 'HS256', typ: 'JWT' })}.${encode(claims)}`;
    const signature = createHmac('sha256', test.deps.tokenSecret).update(content).digest('base64url');

    expect((await ask(`${content}.${signature}`)).status).toBe(200);
  });
});
