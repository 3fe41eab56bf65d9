/**
 * An act: somebody changes something, at one moment, in one transaction. Services receive it as their first
 * argument, so that no write can forget its transaction, its author or its audit entry.
 */
import type { Role } from '@/shared/contract';
import type { Transaction } from '@/server/db/write-queue';
import type { Deps } from '@/server/deps';

/** The signed-in person. */
export interface Actor {
  id: string;
  displayName: string;
  roles: readonly Role[];
  /** The sign-in that the request belongs to. */
  sessionFamilyId: string;
}

/** `Who` is null where nobody is signed in. */
export interface Act<Who extends Pick<Actor, 'id' | 'displayName'> | null = Actor> {
  transaction: Transaction;
  actor: Who;
  requestId: string | null;
  /** ISO moment, the same for everything that the act writes. */
  at: string;
  newId(): string;
  /** Runs after the commit, in the background: for mails and long work, never inside the transaction. */
  afterCommit(name: string, work: () => Promise<void>): void;
}

export type AnyAct = Act<Pick<Actor, 'id' | 'displayName'> | null>;

export interface ActRequest<Who> {
  actor: Who;
  requestId: string | null;
}

/** Runs `perform` as one act in the write queue. */
export async function inAct<Who extends Pick<Actor, 'id' | 'displayName'> | null, T>(
  deps: Deps,
  { actor, requestId }: ActRequest<Who>,
  perform: (act: Act<Who>) => Promise<T>,
): Promise<T> {
  const later: { name: string; work: () => Promise<void> }[] = [];
  const result = await deps.db.inWrite((transaction) =>
    perform({
      transaction,
      actor,
      requestId,
      at: deps.clock.now().toISOString(),
      newId: () => deps.random.uuid(),
      afterCommit: (name, work) => later.push({ name, work }),
    }),
  );
  for (const { name, work } of later) deps.background.run(name, work);
  return result;
}
