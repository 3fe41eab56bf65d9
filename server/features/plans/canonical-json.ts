/** JSON whose bytes depend on the content alone: keys in order, no white space. What a digest is taken of. */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_key, part: unknown) => (isRecord(part) ? inKeyOrder(part) : part));
}

const isRecord = (part: unknown): part is Record<string, unknown> =>
  typeof part === 'object' && part !== null && !Array.isArray(part);

function inKeyOrder(record: Record<string, unknown>): Record<string, unknown> {
  return Object.fromEntries(Object.entries(record).sort(([a], [b]) => (a < b ? -1 : 1)));
}
