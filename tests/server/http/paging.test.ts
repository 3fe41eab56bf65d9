import { z } from 'zod';
import { decodeCursor, encodeCursor, toPage } from '@/server/http/paging';

const rows = Array.from({ length: 7 }, (_, index) => ({ name: `row ${index}`, id: index }));
const shape = z.tuple([z.string(), z.number()]);

const pageFrom = (after: string | undefined, limit: number) => {
  const [, id] = decodeCursor(after, shape) ?? ['', -1];
  return toPage({
    limit,
    fetch: async (count) => rows.filter((row) => row.id > id).slice(0, count),
    toItem: (row) => row.name,
    cursorOf: (row) => [row.name, row.id],
  });
};

describe('keyset paging', () => {
  it('walks through all rows once and ends without a next page', async () => {
    const first = await pageFrom(undefined, 3);
    const second = await pageFrom(first.next, 3);
    const third = await pageFrom(second.next, 3);

    expect(first.items).toEqual(['row 0', 'row 1', 'row 2']);
    expect(second.items).toEqual(['row 3', 'row 4', 'row 5']);
    expect(third).toEqual({ items: ['row 6'] });
  });

  it('has no next page when the rows end with the page', async () => {
    expect(await pageFrom(encodeCursor(['row 3', 3]), 3)).toEqual({ items: ['row 4', 'row 5', 'row 6'] });
  });

  it('shows 50 rows when nobody says how many', async () => {
    const asked: number[] = [];
    const fetch = async (count: number) => {
      asked.push(count);
      return [];
    };

    await toPage({ limit: undefined, fetch, toItem: (row) => row, cursorOf: () => [] });

    expect(asked).toEqual([51]);
  });

  it.each(['nonsense', '', encodeCursor([1, 'a']), encodeCursor(['a'])])(
    'refuses the cursor %j',
    (cursor) => {
      expect(() => decodeCursor(cursor, shape)).toThrow(expect.objectContaining({ code: 'invalid' }));
    },
  );
});
