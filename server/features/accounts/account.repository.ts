import { Op, type Transaction } from 'sequelize';
import type { Account, Role } from '@/shared/contract';
import { AccountModel } from '@/server/db/models/account';

/** An account with what only the server may know. */
export interface StoredAccount extends Account {
  passwordHash: string | null;
}

export interface NewAccount {
  id: string;
  email: string;
  displayName: string;
  roles: Role[];
  status: Account['status'];
  passwordHash: string | null;
  at: string;
}

export async function addAccount(account: NewAccount, transaction: Transaction): Promise<StoredAccount> {
  const { at, ...values } = account;
  return toAccount(await AccountModel.create({ ...values, createdAt: at, updatedAt: at }, { transaction }));
}

export async function findAccount(id: string, transaction?: Transaction): Promise<StoredAccount | undefined> {
  return optional(await AccountModel.findByPk(id, { transaction }));
}

export async function findAccountByEmail(
  email: string,
  transaction?: Transaction,
): Promise<StoredAccount | undefined> {
  return optional(await AccountModel.findOne({ where: { email }, transaction }));
}

export async function countAccounts(transaction?: Transaction): Promise<number> {
  return AccountModel.count({ transaction });
}

/** Accounts by name, from the one after `after`. */
export async function listAccountsAfter(
  after: readonly [displayName: string, id: string] | undefined,
  count: number,
): Promise<StoredAccount[]> {
  const [displayName, id] = after ?? [];
  const beyond = {
    [Op.or]: [{ displayName: { [Op.gt]: displayName } }, { displayName, id: { [Op.gt]: id } }],
  };
  const rows = await AccountModel.findAll({
    where: after ? beyond : {},
    order: ['displayName', 'id'],
    limit: count,
  });
  return rows.map(toAccount);
}

/** Active accounts other than `id`; few enough in a practice to look through. */
export async function listOtherActive(id: string, transaction: Transaction): Promise<StoredAccount[]> {
  const rows = await AccountModel.findAll({ where: { status: 'active', id: { [Op.ne]: id } }, transaction });
  return rows.map(toAccount);
}

export async function listInvited(): Promise<StoredAccount[]> {
  const rows = await AccountModel.findAll({ where: { status: 'invited' }, order: ['displayName', 'id'] });
  return rows.map(toAccount);
}

export type AccountChange = Partial<
  Pick<StoredAccount, 'displayName' | 'roles' | 'status' | 'passwordHash' | 'lastSignInAt'>
>;

export async function changeAccount(
  id: string,
  change: AccountChange & { at: string },
  transaction: Transaction,
): Promise<StoredAccount> {
  const { at, ...values } = change;
  const row = await AccountModel.findByPk(id, { transaction, rejectOnEmpty: true });
  return toAccount(await row.update({ ...values, updatedAt: at }, { transaction }));
}

/** Notes a sign-in without counting as a change of the account. */
export async function noteSignIn(id: string, at: string, transaction: Transaction): Promise<void> {
  await AccountModel.update({ lastSignInAt: at }, { where: { id }, transaction });
}

const optional = (row: AccountModel | null): StoredAccount | undefined => (row ? toAccount(row) : undefined);

function toAccount(row: AccountModel): StoredAccount {
  const { id, email, displayName, roles, status, lastSignInAt, version, passwordHash } = row;
  return { id, email, displayName, roles, status, lastSignInAt, version, passwordHash };
}
