/** The first account of an empty practice, made by whoever can read the console of the server. */
import { z } from 'zod';
import type { Account, firstAdministratorSchema } from '@/shared/contract';
import { inAct, type AnyAct } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Deps } from '@/server/deps';
import {
  addActiveAccount,
  countAllAccounts,
  toPublicAccount,
} from '@/server/features/accounts/account.service';
import { hashPassword } from '@/server/features/auth/password';
import { refuseGuessable } from '@/server/features/auth/password-quality';
import { digestOf } from '@/server/features/auth/session.service';
import { ProblemError } from '@/server/http/problem';
import { findSetting, removeSetting, storeSetting } from './settings.repository';

const CODE_KEY = 'first-administrator';

/** A new one-time code while there is no account; only its digest is stored. */
export async function makeFirstAdministratorCode(deps: Deps): Promise<string | undefined> {
  if ((await countAllAccounts()) > 0) return undefined;
  // 80 bits in groups that can be read aloud.
  const hex = Buffer.from(deps.random.token(), 'base64url').toString('hex').slice(0, 20);
  const code = hex.replace(/(.{5})(?=.)/g, '$1-');
  await deps.db.inWrite((transaction) => storeSetting(CODE_KEY, digestOf(code), transaction));
  return code;
}

export interface FirstAdministratorRequest {
  wanted: z.infer<typeof firstAdministratorSchema>;
  clientIp: string;
  requestId: string;
}

export async function makeFirstAdministrator(
  deps: Deps,
  request: FirstAdministratorRequest,
): Promise<Account> {
  const { wanted, clientIp, requestId } = request;
  await refuseWhenSetUp();
  const throttleKey = `setup ${clientIp}`;
  deps.throttle.attempt(throttleKey);
  await refuseWrongCode(wanted.code);
  deps.throttle.reset(throttleKey);
  refuseGuessable(wanted.password, wanted);
  const passwordHash = await hashPassword(wanted.password);
  return inAct(deps, { actor: null, requestId }, async (act) => {
    // Somebody else may have been first while the password was hashed.
    await refuseWhenSetUp(act);
    await removeSetting(CODE_KEY, act.transaction);
    const { email, displayName } = wanted;
    const account = await addActiveAccount(act, {
      email,
      displayName,
      roles: ['administrator'],
      passwordHash,
    });
    await recordAudit(act, { action: 'account.first-administrator', noun: 'account', nounId: account.id });
    return toPublicAccount(account);
  });
}

async function refuseWhenSetUp(act?: AnyAct): Promise<void> {
  if ((await countAllAccounts(act?.transaction)) > 0)
    throw new ProblemError('conflict', 'This practice has been set up already');
}

async function refuseWrongCode(code: string): Promise<void> {
  const stored = z
    .string()
    .optional()
    .parse(await findSetting(CODE_KEY));
  if (stored === undefined || stored !== digestOf(code.toLowerCase()))
    throw new ProblemError('forbidden', 'The code is not the one on the console of the server');
}
