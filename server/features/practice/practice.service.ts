/** What everybody may know about the practice, signed in or not. */
import type { Practice } from '@/shared/contract';
import type { AnyAct } from '@/server/act';
import { DEMO_ACCOUNTS } from '@/server/db/seeds/demo-accounts';
import type { Transaction } from '@/server/db/write-queue';
import { countAllAccounts } from '@/server/features/accounts/account.service';
import { z } from 'zod';
import { findSetting, storeSetting } from './settings.repository';

const PRACTICE_KEY = 'practice';
const practiceSettingSchema = z.object({
  name: z.string(),
  isDemo: z.boolean(),
  /** The day on which the demonstration was filled, ISO: its dates are counted back from there. */
  demoDay: z.string().optional(),
});
export type PracticeSetting = z.infer<typeof practiceSettingSchema>;

/** Undefined while the database is new. */
export async function findPractice(transaction?: Transaction): Promise<PracticeSetting | undefined> {
  const stored = await findSetting(PRACTICE_KEY, transaction);
  return stored === undefined ? undefined : practiceSettingSchema.parse(stored);
}

/** The practice's name as it stands on printed sheets, and whether its data are invented. */
export async function getPractice(transaction?: Transaction): Promise<PracticeSetting> {
  const practice = await findPractice(transaction);
  if (!practice) throw new Error('The database was never set up');
  return practice;
}

export async function storePractice(act: AnyAct, practice: PracticeSetting): Promise<void> {
  await storeSetting(PRACTICE_KEY, practice, act.transaction);
}

export async function describePractice(): Promise<Practice> {
  const { name, isDemo } = await getPractice();
  return {
    name,
    isDemo,
    needsFirstAdministrator: (await countAllAccounts()) === 0,
    demoAccounts: isDemo ? [...DEMO_ACCOUNTS] : [],
  };
}
