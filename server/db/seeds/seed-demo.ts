/** Fills a new database with the invented practice of the demonstration, in one transaction: all or nothing. */
import { localDateOf } from '@/shared/contract';
import type { Role } from '@/shared/contract';
import { inAct, type Act, type Actor, type AnyAct } from '@/server/act';
import type { Deps } from '@/server/deps';
import { DEMO_ACCOUNTS } from '@/server/db/seeds/demo-accounts';
import { addActiveAccount } from '@/server/features/accounts/account.service';
import { hashPassword } from '@/server/features/auth/password';
import { sha256Of, storeFileAtOnce } from '@/server/features/imports/import.service';
import { createLens } from '@/server/features/lenses/lens.service';
import { storePractice } from '@/server/features/practice/practice.service';
import { seedBiometryCsv } from './demo-biometry';
import { demoLenses } from './demo-lenses';
import { seedHistories, seedRegistrations } from './seed-patients';

const DEMO_PRACTICE = { name: 'Landfall demonstration practice', isDemo: true };

export async function seedDemo(deps: Deps): Promise<void> {
  // Hashing and calculating stay outside of the transaction.
  const passwordHashes = await Promise.all(DEMO_ACCOUNTS.map(({ password }) => hashPassword(password)));
  const lenses = demoLenses();
  const biometry = seedBiometryCsv(localDateOf(deps.clock.now()));
  const file = { name: 'demonstration-biometry.csv', bytes: biometry, sha256: sha256Of(biometry) };
  await inAct(deps, { actor: null, requestId: null }, async (act) => {
    const actors = await seedAccounts(act, passwordHashes);
    await storePractice(act, DEMO_PRACTICE);
    const technician = as(act, actors.technician);
    for (const lens of lenses) await createLens(as(act, actors.administrator), lens, { isDemo: true });
    await storeFileAtOnce(deps, technician, file);
    await seedHistories(technician);
    await seedRegistrations(technician);
  });
}

/** The same act in somebody's name, so that the audit trail names who would have done it. */
const as = (act: AnyAct, actor: Actor): Act => ({ ...act, actor });

async function seedAccounts(act: AnyAct, passwordHashes: readonly string[]): Promise<Record<Role, Actor>> {
  const actors: Partial<Record<Role, Actor>> = {};
  for (const [index, { email, displayName, roles }] of DEMO_ACCOUNTS.entries()) {
    const { id } = await addActiveAccount(act, {
      email,
      displayName,
      roles,
      passwordHash: passwordHashes[index] ?? '',
    });
    for (const role of roles) actors[role] = { id, displayName, roles, sessionFamilyId: 'demonstration' };
  }
  return actors as Record<Role, Actor>;
}
