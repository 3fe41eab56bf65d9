/** Lets requests have their turn in the middle of long work. */
export function breathe(): Promise<void> {
  return new Promise((resolve) => setImmediate(resolve));
}
