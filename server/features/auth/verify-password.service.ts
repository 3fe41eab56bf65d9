/** Asks a signed-in person for the password again, before an act that carries their name. */
import { inAct, type Actor } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Deps } from '@/server/deps';
import { findById } from '@/server/features/accounts/account.service';
import { ProblemError } from '@/server/http/problem';
import { matchesPassword } from './password';

export interface PasswordCheck {
  actor: Actor;
  password: string;
  requestId: string;
}

/** Throws when the password is wrong (403) or was wrong too often (429). Call it before the write begins. */
export async function verifyPassword(
  deps: Deps,
  { actor, password, requestId }: PasswordCheck,
): Promise<void> {
  const throttleKey = `verify ${actor.id}`;
  const attemptsLeft = deps.throttle.attempt(throttleKey);
  const account = await findById(actor.id);
  if (await matchesPassword(password, account?.passwordHash ?? null)) return deps.throttle.reset(throttleKey);
  const note = { action: 'password.refused', noun: 'account', nounId: actor.id, detail: { attemptsLeft } };
  await inAct(deps, { actor, requestId }, (act) => recordAudit(act, note));
  throw new ProblemError('wrong-password');
}
