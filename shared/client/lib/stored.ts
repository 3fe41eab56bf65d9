/**
 * The browser's local storage, which may be missing or refuse (private windows, tests, native).
 */
export function readStored(key: string): string | null {
  try {
    return globalThis.localStorage?.getItem(key) ?? null;
  } catch {
    return null;
  }
}

export function writeStored(key: string, value: string | null): void {
  try {
    if (value === null) globalThis.localStorage?.removeItem(key);
    else globalThis.localStorage?.setItem(key, value);
  } catch {
    // A full or forbidden storage loses a convenience, never data: nothing to report.
  }
}

/** Names of everything stored that begins so. */
export function storedKeys(prefix: string): string[] {
  try {
    return Object.keys(globalThis.localStorage ?? {}).filter((key) => key.startsWith(prefix));
  } catch {
    return [];
  }
}
