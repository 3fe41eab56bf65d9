/** Accounts, as other features use them. Inviting and changing stand in `account-management.service.ts`. */
import type { Account, SessionUser } from '@/shared/contract';
import type { AnyAct } from '@/server/act';
import type { Transaction } from '@/server/db/write-queue';
import {
  addAccount,
  changeAccount,
  countAccounts,
  findAccount,
  findAccountByEmail,
  noteSignIn,
  type NewAccount,
  type StoredAccount,
} from './account.repository';

export type { StoredAccount };

export const countAllAccounts = (transaction?: Transaction): Promise<number> => countAccounts(transaction);

export const findById = (id: string, transaction?: Transaction): Promise<StoredAccount | undefined> =>
  findAccount(id, transaction);

export const findByEmail = (email: string, transaction?: Transaction): Promise<StoredAccount | undefined> =>
  findAccountByEmail(email, transaction);

/** An account that may sign in at once: of the demonstration, or the first administrator. */
export async function addActiveAccount(
  act: AnyAct,
  account: Pick<NewAccount, 'email' | 'displayName' | 'roles'> & { passwordHash: string },
): Promise<StoredAccount> {
  return addAccount({ ...account, id: act.newId(), status: 'active', at: act.at }, act.transaction);
}

/** Sets the password; an invited account becomes active by it. */
export async function setPassword(act: AnyAct, id: string, passwordHash: string): Promise<StoredAccount> {
  return changeAccount(id, { passwordHash, status: 'active', at: act.at }, act.transaction);
}

export async function recordSignIn(act: AnyAct, id: string): Promise<void> {
  await noteSignIn(id, act.at, act.transaction);
}

/** Without what only the server may know. */
export function toPublicAccount({ passwordHash: _secret, ...account }: StoredAccount): Account {
  return account;
}

export function toSessionUser({ id, email, displayName, roles }: StoredAccount): SessionUser {
  return { id, email, displayName, roles };
}
