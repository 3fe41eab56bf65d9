import { verifyPassword } from '@/server/features/auth/verify-password.service';
import { auditOf } from '@/tests/support/audit-trail';
import { startTestApp, TEST_PASSWORD, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

const checkFor = async () => {
  const { id, displayName } = await test.signInAs('surgeon');
  const actor = { id, displayName, roles: ['surgeon' as const], sessionFamilyId: 'family' };
  return (password: string) => verifyPassword(test.deps, { actor, password, requestId: 'request-1' });
};

describe('asking for the password again', () => {
  it('accepts the right one', async () => {
    const check = await checkFor();

    await expect(check(TEST_PASSWORD)).resolves.toBeUndefined();
  });

  it('refuses a wrong one and notes it with the name of the person', async () => {
    const check = await checkFor();

    await expect(check('not it')).rejects.toMatchObject({ code: 'wrong-password' });

    expect((await auditOf('password.refused')).at(-1)).toMatchObject({
      noun: 'account',
      requestId: 'request-1',
      detail: { attemptsLeft: 4 },
    });
  });

  it('stops after five wrong ones, even when the sixth is right', async () => {
    const check = await checkFor();
    for (let guess = 0; guess < 5; guess += 1) await check('not it').catch(() => undefined);

    await expect(check(TEST_PASSWORD)).rejects.toMatchObject({ code: 'too-many-requests' });
  });
});
