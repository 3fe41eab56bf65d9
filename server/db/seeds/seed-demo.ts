/** Fills a new database with the invented practice of the demonstration, in one transaction: all or nothing. */
import { localDateOf, type Role } from '@/shared/contract';
import { inAct, type Actor, type AnyAct } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Deps } from '@/server/deps';
import { DEMO_ACCOUNTS } from '@/server/db/seeds/demo-accounts';
import { addActiveAccount } from '@/server/features/accounts/account.service';
import { hashPassword } from '@/server/features/auth/password';
import { storePractice } from '@/server/features/practice/practice.service';
import { demoCohort } from './demo-cohort';
import { clinicMoment } from './demo-days';
import { lensSteps } from './seed-lenses';
import { fileSteps, historySteps, registrationStep, remeasurementSteps } from './seed-patients';
import { planSteps, settlementSteps } from './seed-plans';
import type { SeedStep } from './seed-step';

export const DEMO_PRACTICE_NAME = 'Saltfern Harbour Eye Practice (demo)';
const OPENED_DAYS_AGO = 960;

export async function seedDemo(deps: Deps): Promise<void> {
  // Hashing and calculating stay outside of the transaction.
  const passwordHashes = await Promise.all(DEMO_ACCOUNTS.map(({ password }) => hashPassword(password)));
  const demoDay = localDateOf(deps.clock.now());
  const steps = stepsOf(deps, demoDay);
  await inAct(deps, { actor: null, requestId: null }, async (act) => {
    const opening = { ...act, at: clinicMoment(demoDay, OPENED_DAYS_AGO, '08:00') };
    const actors = await seedAccounts(opening, passwordHashes);
    await storePractice(act, { name: DEMO_PRACTICE_NAME, isDemo: true, demoDay });
    for (const { at, by, perform } of steps) await perform({ ...act, at, actor: actors[by] });
    // Said in the trail itself: its earlier entries tell of an invented past.
    await recordAudit(act, {
      action: 'demo.fill',
      noun: 'practice',
      detail: { demoDay, acts: steps.length },
    });
  });
}

function stepsOf(deps: Deps, demoDay: string): SeedStep[] {
  const cases = demoCohort();
  const steps = [
    ...lensSteps(demoDay),
    ...fileSteps(deps, cases, demoDay),
    ...historySteps(cases, demoDay),
    ...remeasurementSteps(cases, demoDay),
    registrationStep(demoDay),
    ...settlementSteps(cases, demoDay),
    ...planSteps(cases, demoDay),
  ];
  return steps.sort((a, b) => (a.at < b.at ? -1 : a.at > b.at ? 1 : 0));
}

async function seedAccounts(act: AnyAct, passwordHashes: readonly string[]): Promise<Record<Role, Actor>> {
  const actors: Partial<Record<Role, Actor>> = {};
  for (const [index, { email, displayName, roles }] of DEMO_ACCOUNTS.entries()) {
    const passwordHash = passwordHashes[index] ?? '';
    const { id } = await addActiveAccount(act, { email, displayName, roles, passwordHash });
    for (const role of roles) actors[role] = { id, displayName, roles, sessionFamilyId: 'demonstration' };
  }
  return actors as Record<Role, Actor>;
}
