/**
 * The key that makes a POST happen once: the same for every try with the same content, so that a second click
 * or a retry after a lost reply is answered with what the first one did.
 */
import { useState } from 'react';

export interface RequestKeys {
  keyFor: (content: unknown) => string;
  /** After success: the next press, even with the same content, is a new act. */
  done: () => void;
}

export function createRequestKeys(newKey: () => string = randomKey): RequestKeys {
  let current: { content: string; key: string } | undefined;
  return {
    keyFor: (content) => {
      const text = JSON.stringify(content ?? null);
      if (current?.content !== text) current = { content: text, key: newKey() };
      return current.key;
    },
    done: () => {
      current = undefined;
    },
  };
}

export function useRequestKeys(): RequestKeys {
  const [keys] = useState(() => createRequestKeys());
  return keys;
}

/** `crypto.randomUUID` is missing on plain http of another machine; random bytes are there everywhere. */
export function randomKey(): string {
  const bytes = globalThis.crypto.getRandomValues(new Uint8Array(16));
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
}
