/** Accounts of the practice. */
import type { AnyAct } from '@/server/act';
import { addAccount, countAccounts, type NewAccount, type StoredAccount } from './account.repository';

export async function countAllAccounts(): Promise<number> {
  return countAccounts();
}

/** An account that may sign in at once: of the demonstration, or the first administrator. */
export async function addActiveAccount(
  act: AnyAct,
  account: Pick<NewAccount, 'email' | 'displayName' | 'roles'> & { passwordHash: string },
): Promise<StoredAccount> {
  return addAccount({ ...account, id: act.newId(), status: 'active', at: act.at }, act.transaction);
}
