/** Optimistic locking over HTTP: the version goes out as a strong ETag and comes back as If-Match. */
import { ProblemError } from '@/server/http/problem';

export const etagOf = (version: number): string => `"${version}"`;

/** Version named by If-Match. A tag that is not one of ours matches no version. */
export function versionFromIfMatch(header: string | undefined): number {
  if (header === undefined || header.trim() === '') throw new ProblemError('if-match-required');
  const match = /^"(\d{1,9})"$/.exec(header.trim());
  return match?.[1] === undefined ? -1 : Number(match[1]);
}

/** Call inside the transaction, before the change. `current` is the representation that the client gets back. */
export function requireVersion(expected: number, stored: number, current: unknown): void {
  if (expected !== stored) throw new ProblemError('changed-meanwhile', undefined, { current });
}
