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

export const digestOf = (text: string): string => hash('sha256', text, 'hex');

export function freeze(snapshot: PlanSnapshot): Frozen {
  const text = canonicalJson(snapshot);
  return { text, digest: digestOf(text) };
}

/** Throws rather than show a plan whose text is not the one that was signed. */
export function readFrozen({
  snapshot,
  digest,
}: {
  snapshot: string | null;
  digest: string | null;
}): PlanSnapshot {
  if (snapshot === null || digestOf(snapshot) !== digest) {
    throw new ProblemError(
      'conflict',
      'The stored plan does not match its digest: it is not shown. Tell the administrator.',
    );
  }
  return planSnapshotSchema.parse(JSON.parse(snapshot));
}
