import { PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import { IdempotencyKeyModel } from '@/server/db/models/idempotency-key';
import { HOUR, MINUTE } from '@/tests/support/fake-clock';
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

const person = (email: string) => ({ email, displayName: 'Wren Pool', roles: ['nurse'] });

const invite = (who: SignedIn, email: string, key: string) =>
  who.post('/api/accounts', person(email)).set('Idempotency-Key', key);

describe('a POST with an Idempotency-Key', () => {
  it('runs once and answers the repetition with the first reply', async () => {
    const first = await invite(administrator, 'once@practice.example', 'key-once-1');
    const second = await invite(administrator, 'once@practice.example', 'key-once-1');
    await test.deps.background.idle();

    expect(first.status).toBe(201);
    expect(second.status).toBe(201);
    expect(second.body).toEqual(first.body);
    expect(second.headers.location).toBe(first.headers.location);
    expect(second.headers.etag).toBe('"0"');
    expect(test.mailer.sent).toHaveLength(1);
  });

  it('runs once when both arrive at the same time', async () => {
    const replies = await Promise.all(
      [1, 2, 3].map(() => invite(administrator, 'race@practice.example', 'key-race-1')),
    );

    expect(replies.map(({ status }) => status)).toEqual([201, 201, 201]);
    expect(new Set(replies.map(({ body }) => body.id)).size).toBe(1);
  });

  it('refuses the key for another body', async () => {
    await invite(administrator, 'one@practice.example', 'key-other-1');
    const reply = await invite(administrator, 'two@practice.example', 'key-other-1');

    expect(reply.status).toBe(422);
    expect(reply.body.type).toBe(`${PROBLEM_TYPE_PREFIX}idempotency-mismatch`);
  });

  it('does not mix up the keys of two people', async () => {
    const colleague = await test.signInAs('administrator');

    await invite(administrator, 'mine@practice.example', 'key-shared-1');
    const reply = await invite(colleague, 'yours@practice.example', 'key-shared-1');

    expect(reply.status).toBe(201);
    expect(reply.body.email).toBe('yours@practice.example');
  });

  it('keeps nothing of a request that failed', async () => {
    await invite(administrator, 'taken@practice.example', 'key-first-1');
    const refused = await invite(administrator, 'taken@practice.example', 'key-second-1');
    const corrected = await invite(administrator, 'free@practice.example', 'key-second-1');

    expect(refused.status).toBe(409);
    expect(corrected.status).toBe(201);
  });

  it('forgets the key after a day', async () => {
    await invite(administrator, 'day@practice.example', 'key-day-1');
    test.clock.advance(24 * HOUR + MINUTE);
    const later = await test.signInAs('administrator');
    await invite(later, 'unrelated@practice.example', 'key-day-2');

    expect(await IdempotencyKeyModel.count({ where: { key: 'key-day-1' } })).toBe(0);
    expect(await IdempotencyKeyModel.count({ where: { key: 'key-day-2' } })).toBe(1);
  });

  it('refuses a key that is too short to be unique', async () => {
    const reply = await invite(administrator, 'short@practice.example', 'abc');

    expect(reply.status).toBe(422);
    expect(reply.body.errors[0].path).toBe('Idempotency-Key');
  });
});
