/**
 * What somebody was typing, kept per person so that it survives a reload and the end of an idle session.
 * It holds only the open form, and is removed when that form is saved or given up.
 */
import { readStored, writeStored } from './stored';

const PREFIX = 'landfall.draft.1';
const keyOf = (userId: string, form: string) => `${PREFIX}.${userId}.${form}`;

export function readDraft<T>(userId: string, form: string): T | undefined {
  const text = readStored(keyOf(userId, form));
  if (text === null) return undefined;
  try {
    return JSON.parse(text) as T;
  } catch {
    return undefined;
  }
}

export function writeDraft(userId: string, form: string, values: unknown): void {
  writeStored(keyOf(userId, form), JSON.stringify(values));
}

export function removeDraft(userId: string, form: string): void {
  writeStored(keyOf(userId, form), null);
}
