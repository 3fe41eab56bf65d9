/** Keyset paging: the cursor holds the sort values of the last row seen, never an offset. */
import type { z } from 'zod';
import { PAGE_LIMIT_DEFAULT, type Page } from '@/shared/contract';
import { invalidField } from '@/server/http/problem';

export function encodeCursor(sortValues: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify(sortValues)).toString('base64url');
}

/** Sort values of a cursor, checked against their shape; undefined for the first page. */
export function decodeCursor<T>(cursor: string | undefined, shape: z.ZodType<T>): T | undefined {
  if (cursor === undefined) return undefined;
  const parsed = shape.safeParse(parseJson(Buffer.from(cursor, 'base64url').toString('utf8')));
  if (!parsed.success) throw invalidField('after', 'This is not the mark of a page');
  return parsed.data;
}

export interface PageRequest<Row, Item> {
  limit: number | undefined;
  /** Must return up to `count` rows in the order of the cursor. */
  fetch: (count: number) => Promise<Row[]>;
  toItem: (row: Row) => Item;
  cursorOf: (row: Row) => readonly (string | number)[];
}

/** Fetches one row more than asked for, to know whether another page follows. */
export async function toPage<Row, Item>(request: PageRequest<Row, Item>): Promise<Page<Item>> {
  const limit = request.limit ?? PAGE_LIMIT_DEFAULT;
  const rows = await request.fetch(limit + 1);
  const shown = rows.slice(0, limit);
  const last = shown.at(-1);
  const hasMore = rows.length > limit && last !== undefined;
  return {
    items: shown.map(request.toItem),
    ...(hasMore ? { next: encodeCursor(request.cursorOf(last)) } : {}),
  };
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
