import request from 'supertest';
import { startTestApp, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

describe('GET /api/practice', () => {
  it('tells everybody the name, and shows no demo accounts outside of the demo', async () => {
    const reply = await request(test.app).get('/api/practice');

    expect(reply.status).toBe(200);
    expect(reply.body).toEqual({
      name: 'Test practice',
      isDemo: false,
      needsFirstAdministrator: true,
      demoAccounts: [],
    });
    expect(reply.headers['cache-control']).toBe('no-store');
  });
});
