import request from 'supertest';
import { PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import { startTestApp, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp({ publicRequestsPerMinute: 3 });
});
afterAll(() => test.close());

describe('the public part of the API', () => {
  it('answers one address only so often in a minute', async () => {
    const ask = () => request(test.app).get('/api/auth/links/unknown');

    const statuses = [await ask(), await ask(), await ask(), await ask()].map(({ status }) => status);
    const last = await ask();

    expect(statuses).toEqual([410, 410, 410, 429]);
    expect(last.body.type).toBe(`${PROBLEM_TYPE_PREFIX}too-many-requests`);
    expect(last.headers['retry-after']).toBe('60');
    expect((await request(test.app).get('/api/practice')).status).toBe(200);
  });
});
