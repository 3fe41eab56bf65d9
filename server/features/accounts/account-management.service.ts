/** What the administrator does with accounts. */
import { z } from 'zod';
import type { Account, accountChangeSchema, invitationSchema, Page } from '@/shared/contract';
import type { Act } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Deps } from '@/server/deps';
import { sendPasswordLink, closeAllLinksOf } from '@/server/features/auth/password-link.service';
import { endAllSessionsOf } from '@/server/features/auth/session.service';
import { requireVersion } from '@/server/http/etag';
import { decodeCursor, toPage } from '@/server/http/paging';
import { invalidField, ProblemError, takenField } from '@/server/http/problem';
import {
  addAccount,
  changeAccount,
  findAccount,
  findAccountByEmail,
  listAccountsAfter,
  listOtherActive,
  type StoredAccount,
} from './account.repository';
import { toPublicAccount } from './account.service';

export async function listAccounts(
  limit: number | undefined,
  after: string | undefined,
): Promise<Page<Account>> {
  const from = decodeCursor(after, z.tuple([z.string(), z.string()]));
  return toPage({
    limit,
    fetch: (count) => listAccountsAfter(from, count),
    toItem: toPublicAccount,
    cursorOf: ({ displayName, id }) => [displayName, id],
  });
}

export async function inviteAccount(
  deps: Deps,
  act: Act,
  invitation: z.infer<typeof invitationSchema>,
): Promise<Account> {
  if (await findAccountByEmail(invitation.email, act.transaction))
    throw takenField('email', 'There is an account with this e-mail address');
  const account = await addAccount(
    { ...invitation, id: act.newId(), status: 'invited', passwordHash: null, at: act.at },
    act.transaction,
  );
  await sendPasswordLink(deps, act, { account, kind: 'invitation' });
  const { id, version, email, roles } = account;
  const detail = { email, roles };
  await recordAudit(act, { action: 'account.invite', noun: 'account', nounId: id, version, detail });
  return toPublicAccount(account);
}

export async function inviteAgain(deps: Deps, act: Act, id: string): Promise<Account> {
  const account = await getAccount(act, id);
  if (account.status !== 'invited')
    throw new ProblemError('conflict', 'Only an account that waits for its first password is invited again');
  await sendPasswordLink(deps, act, { account, kind: 'invitation' });
  await recordAudit(act, { action: 'account.invite-again', noun: 'account', nounId: id });
  return toPublicAccount(account);
}

export interface AccountChangeRequest {
  id: string;
  ifMatch: number;
  change: z.infer<typeof accountChangeSchema>;
}

export async function changeAccountByRequest(
  act: Act,
  { id, ifMatch, change }: AccountChangeRequest,
): Promise<Account> {
  const before = await getAccount(act, id);
  requireVersion(ifMatch, before.version, toPublicAccount(before));
  refuseWrongStatus(before, change.status);
  await refuseLosingLastAdministrator(act, before, change);

  const after = await changeAccount(id, { ...change, at: act.at }, act.transaction);
  const isDisabled = after.status === 'disabled' && before.status !== 'disabled';
  if (isDisabled || !sameRoles(before, after)) await endAllSessionsOf(act, id);
  if (isDisabled) await closeAllLinksOf(act, id);
  const detail = { before: described(before), after: described(after) };
  await recordAudit(act, {
    action: 'account.change',
    noun: 'account',
    nounId: id,
    version: after.version,
    detail,
  });
  return toPublicAccount(after);
}

async function getAccount(act: Act, id: string): Promise<StoredAccount> {
  const account = await findAccount(id, act.transaction);
  if (!account) throw new ProblemError('not-found');
  return account;
}

/** Only a password makes an account active, and only once: what waits for one is "invited", before and after. */
function refuseWrongStatus({ status, passwordHash }: StoredAccount, wanted: Account['status']): void {
  if (wanted === status || wanted === 'disabled') return;
  const possible = passwordHash === null ? 'invited' : 'active';
  if (wanted !== possible) throw invalidField('status', `This account can be ${possible} or disabled`);
}

async function refuseLosingLastAdministrator(
  act: Act,
  before: StoredAccount,
  after: Pick<Account, 'roles' | 'status'>,
): Promise<void> {
  if (!isActiveAdministrator(before) || isActiveAdministrator(after)) return;
  const others = await listOtherActive(before.id, act.transaction);
  if (others.some(isActiveAdministrator)) return;
  const path = after.status === 'active' ? 'roles' : 'status';
  const message = 'This is the last active administrator';
  throw new ProblemError('conflict', message, { fields: [{ path, code: 'last-administrator', message }] });
}

const isActiveAdministrator = ({ roles, status }: Pick<Account, 'roles' | 'status'>): boolean =>
  status === 'active' && roles.includes('administrator');

const sameRoles = (a: StoredAccount, b: StoredAccount): boolean =>
  [...a.roles].sort().join() === [...b.roles].sort().join();

const described = ({ displayName, roles, status }: StoredAccount) => ({ displayName, roles, status });
