/** The frozen text of a signed plan, checked against its digest whenever it is read. */
import { hash } from 'node:crypto';
import { planSnapshotSchema, type PlanSnapshot } from '@/shared/contract';
import { ProblemError } from '@/server/http/problem';
import { canonicalJson } from './canonical-json';

export interface Frozen {
  text: string;
  /** SHA-256 of the text, hex. */
  digest: string;
}

/** As it is stored: both null while nothing is signed. */
export interface StoredText {
  snapshot: string | null;
  digest: string | null;
}

export const digestOf = (text: string): string => hash('sha256', text, 'hex');

/** The schema is checked here, once and for all: later the digest vouches for the text. */
export function freeze(snapshot: PlanSnapshot): Frozen {
  const text = canonicalJson(planSnapshotSchema.parse(snapshot));
  return { text, digest: digestOf(text) };
}

export const MISMATCH = 'The stored plan does not match its digest and is not shown. Tell the administrator.';

/** Null when the text is not the one that was signed: for lists, which say so and go on. */
export function findFrozen({ snapshot, digest }: StoredText): PlanSnapshot | null {
  if (snapshot === null || digestOf(snapshot) !== digest) return null;
  return JSON.parse(snapshot) as PlanSnapshot;
}

/** Throws rather than show a plan whose text is not the one that was signed. */
export function readFrozen(stored: StoredText): PlanSnapshot {
  const frozen = findFrozen(stored);
  if (!frozen) throw new ProblemError('conflict', MISMATCH);
  return frozen;
}
