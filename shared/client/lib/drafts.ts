/**
 * What somebody was typing, kept per person so that it survives a reload and the end of a session, idle or not.
 * It holds only the open form, goes when that form is saved or given up, and goes by itself after a week:
 * what was typed about a patient must not lie in a browser for ever.
 */
import { readStored, storedKeys, writeStored } from './stored';

const PREFIX = 'landfall.draft.1';
const KEPT_MS = 7 * 24 * 60 * 60 * 1000;

interface Draft {
  savedAtMs: number;
  values: unknown;
}

const keyOf = (userId: string, form: string) => `${PREFIX}.${userId}.${form}`;

export function readDraft<T>(userId: string, form: string): T | undefined {
  const draft = draftAt(keyOf(userId, form));
  return draft && isFresh(draft) ? (draft.values as T) : undefined;
}

export function writeDraft(userId: string, form: string, values: unknown): void {
  const draft: Draft = { savedAtMs: Date.now(), values };
  writeStored(keyOf(userId, form), JSON.stringify(draft));
}

export function removeDraft(userId: string, form: string): void {
  writeStored(keyOf(userId, form), null);
}

/** Removes the drafts of everybody that are too old or of an earlier shape. */
export function removeOldDrafts(): void {
  for (const key of storedKeys('landfall.draft.')) {
    const draft = draftAt(key);
    if (!key.startsWith(`${PREFIX}.`) || !draft || !isFresh(draft)) writeStored(key, null);
  }
}

function draftAt(key: string): Draft | undefined {
  try {
    const draft = JSON.parse(readStored(key) ?? 'null') as Partial<Draft> | null;
    return typeof draft?.savedAtMs === 'number' ? (draft as Draft) : undefined;
  } catch {
    return undefined;
  }
}

const isFresh = ({ savedAtMs }: Draft): boolean => Date.now() - savedAtMs < KEPT_MS;
