import { paths, type Home, type Role } from '@/shared/contract';
import { seedDemo } from '@/server/db/seeds/seed-demo';
import { startTestApp, type TestApp } from '@/tests/support/test-app';

let test: TestApp;

beforeAll(async () => {
  test = await startTestApp();
  await seedDemo(test.deps);
}, 60_000);
afterAll(() => test.close());

async function homeOf(role: Role): Promise<Home['sections']> {
  const somebody = await test.signInAs(role);
  const reply = await somebody.get(paths.home());
  expect(reply.status).toBe(200);
  return (reply.body as Home).sections;
}

const ids = (sections: Home['sections']): string[] => sections.map(({ id }) => id);

describe('home', () => {
  it('shows each role what waits for that role and nothing else', async () => {
    expect(ids(await homeOf('technician'))).toEqual(['ready-imports']);
    expect(ids(await homeOf('surgeon'))).toEqual(['drafts', 'out-of-date', 'signed-plans']);
    expect(ids(await homeOf('counsellor'))).toEqual(['signed-plans']);
    expect(ids(await homeOf('nurse'))).toEqual(['signed-plans']);
  });

  it('tells the counsellor in plain words what was signed, newest first, with an honest total', async () => {
    const [signed] = await homeOf('counsellor');

    expect(signed?.total).toBe(15);
    expect(signed?.items).toHaveLength(5);
    expect(signed?.items[0]?.detail).toMatch(/power \+?\d/);
    expect(signed?.items[0]?.href).toMatch(/^\/plans\/[0-9a-f-]{36}$/);
  });

  it('names the signed plan that no longer stands, with the reason', async () => {
    const stale = (await homeOf('surgeon')).find(({ id }) => id === 'out-of-date');

    expect(stale?.total).toBe(1);
    expect(stale?.items[0]?.detail).toMatch(/measurement/i);
  });
});
