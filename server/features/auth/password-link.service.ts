/** Links by which somebody sets a password: sent by mail, used once, gone after a time. */
import type { z } from 'zod';
import type { passwordLinkSchema } from '@/shared/contract';
import { inAct, type AnyAct } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Deps } from '@/server/deps';
import {
  findByEmail,
  findById,
  setPassword,
  type StoredAccount,
} from '@/server/features/accounts/account.service';
import { getPractice } from '@/server/features/practice/practice.service';
import { ProblemError } from '@/server/http/problem';
import { addLink, closeLinksOf, findOpenLink, type StoredLink } from './password-link.repository';
import { passwordMail } from './password-mail';
import { refuseGuessable } from './password-quality';
import { hashPassword } from './password';
import { digestOf, endAllSessionsOf } from './session.service';

const HOUR_MS = 60 * 60 * 1000;
const LIFE_MS = { invitation: 72 * HOUR_MS, reset: HOUR_MS };

/** Makes a link, closes the earlier ones of the account, and mails it after the commit. */
export async function sendPasswordLink(
  deps: Deps,
  act: AnyAct,
  { account, kind }: { account: StoredAccount; kind: StoredLink['kind'] },
): Promise<void> {
  const token = deps.random.token();
  const expiresAt = new Date(Date.parse(act.at) + LIFE_MS[kind]).toISOString();
  await closeLinksOf(act, account.id);
  await addLink(act, { id: act.newId(), kind, accountId: account.id, expiresAt, tokenHash: digestOf(token) });
  act.afterCommit(`${kind} mail`, async () => {
    const { name } = await getPractice();
    const { email, displayName } = account;
    const link = `${deps.config.origin}/set-password?token=${token}`;
    await deps.mailer.send(passwordMail({ kind, to: email, displayName, practiceName: name, link }));
  });
}

/** Sends a reset link when the address belongs to an active account. The caller learns nothing either way. */
export function requestReset(deps: Deps, { email, requestId }: { email: string; requestId: string }): void {
  deps.background.run('password reset', () =>
    inAct(deps, { actor: null, requestId }, async (act) => {
      const account = await findByEmail(email, act.transaction);
      if (account?.status !== 'active') return;
      await sendPasswordLink(deps, act, { account, kind: 'reset' });
      await recordAudit(act, { action: 'account.reset-request', noun: 'account', nounId: account.id });
    }),
  );
}

export async function describeLink(deps: Deps, token: string): Promise<z.infer<typeof passwordLinkSchema>> {
  const { link, account } = await openLink(deps, token);
  return {
    kind: link.kind,
    email: account.email,
    displayName: account.displayName,
    expiresAt: link.expiresAt,
  };
}

export interface PasswordFromLink {
  token: string;
  password: string;
  requestId: string;
}

/** Sets the password, uses the link up and ends every sign-in of the account. */
export async function setPasswordByLink(deps: Deps, request: PasswordFromLink): Promise<void> {
  const { account } = await openLink(deps, request.token);
  refuseGuessable(request.password, account);
  const passwordHash = await hashPassword(request.password);
  await inAct(deps, { actor: account, requestId: request.requestId }, async (act) => {
    // The link may have been used while the password was hashed.
    const { link } = await openLink(deps, request.token, act);
    await closeLinksOf(act, account.id);
    await endAllSessionsOf(act, account.id);
    const { id, version } = await setPassword(act, account.id, passwordHash);
    const detail = { by: link.kind };
    await recordAudit(act, { action: 'account.set-password', noun: 'account', nounId: id, version, detail });
  });
}

/** For an account that is disabled: its mails become worthless. */
export async function closeAllLinksOf(act: AnyAct, accountId: string): Promise<void> {
  await closeLinksOf(act, accountId);
}

async function openLink(
  deps: Deps,
  token: string,
  act?: AnyAct,
): Promise<{ link: StoredLink; account: StoredAccount }> {
  const now = deps.clock.now().toISOString();
  const link = await findOpenLink(digestOf(token), now, act?.transaction);
  const account = link && (await findById(link.accountId, act?.transaction));
  if (!link || !account || account.status === 'disabled') throw new ProblemError('link-expired');
  return { link, account };
}
