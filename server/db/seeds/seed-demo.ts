/** Fills a new database with the invented practice of the demonstration, in one transaction: all or nothing. */
import { inAct, type AnyAct } from '@/server/act';
import type { Deps } from '@/server/deps';
import { DEMO_ACCOUNTS } from '@/server/db/seeds/demo-accounts';
import { addActiveAccount } from '@/server/features/accounts/account.service';
import { hashPassword } from '@/server/features/auth/password';
import { storePractice } from '@/server/features/practice/practice.service';

const DEMO_PRACTICE = { name: 'Landfall demonstration practice', isDemo: true };

export async function seedDemo(deps: Deps): Promise<void> {
  // Hashing is slow and stays outside of the transaction.
  const passwordHashes = await Promise.all(DEMO_ACCOUNTS.map(({ password }) => hashPassword(password)));
  await inAct(deps, { actor: null, requestId: null }, async (act) => {
    await seedAccounts(act, passwordHashes);
    await storePractice(act, DEMO_PRACTICE);
  });
}

async function seedAccounts(act: AnyAct, passwordHashes: readonly string[]): Promise<void> {
  for (const [index, { email, displayName, roles }] of DEMO_ACCOUNTS.entries()) {
    await addActiveAccount(act, { email, displayName, roles, passwordHash: passwordHashes[index] ?? '' });
  }
}
