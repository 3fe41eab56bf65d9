/** Records in batches say the same as the whole text parsed at once, wherever the portions end. */
import * as fc from 'fast-check';
import Papa from 'papaparse';
import { decodeText } from '@/server/csv/decode';
import { BrokenQuoteError, firstRecord, recordBatches, type CsvRecord } from '@/server/csv/records';

const recordsOf = (text: string): CsvRecord[] => [...recordBatches(text, ',')].flat();

const field = fc.oneof(
  fc.string({ unit: 'grapheme', maxLength: 12 }).map((text) => text.replace(/\r/g, '')),
  fc.constantFrom(
    '',
    'plain',
    '23.51',
    '"',
    '""',
    'a "b" c',
    'one\ntwo\n\nfour',
    'a,b',
    ' space ',
    '\n',
    "'",
  ),
);
const records = fc.array(fc.array(field, { minLength: 2, maxLength: 5 }), { minLength: 1, maxLength: 40 });

const isBlank = (fields: readonly string[]): boolean => fields.every((text) => text.trim() === '');

/** Lines on which the records begin, counted independently of the parser. */
function expectedRecords(rows: readonly string[][]): CsvRecord[] {
  let line = 1;
  return rows.flatMap((fields) => {
    const record = { line, fields };
    line += 1 + fields.join('').split('\n').length - 1;
    return isBlank(fields) ? [] : [record];
  });
}

it('finds every record and its line', () => {
  fc.assert(
    fc.property(records, (rows) => {
      const text = Papa.unparse(rows, { newline: '\n' });
      expect(recordsOf(text)).toEqual(expectedRecords(rows));
    }),
  );
});

it('finds them across portions of a long text', () => {
  fc.assert(
    fc.property(records, fc.integer({ min: 0, max: 200 }), (rows, shift) => {
      const many = [['x'.repeat(shift), 'y'], ...Array.from({ length: 1200 }, () => rows).flat()].slice(
        0,
        30_000,
      );
      const text = Papa.unparse(many, { newline: '\n' });
      const found = recordsOf(text);

      // Compared as text: a mismatch of a megabyte is not worth printing.
      expect(JSON.stringify(found) === JSON.stringify(expectedRecords(many))).toBe(true);
    }),
    { numRuns: 10 },
  );
}, 60_000);

it('finds a record that is longer than a portion', () => {
  const long = `line\n${'x'.repeat(1_000_000)}`;
  const text = Papa.unparse(
    [
      ['a', 'b'],
      [long, 'c'],
      ['d', 'e'],
    ],
    { newline: '\n' },
  );

  expect(recordsOf(text).map(({ line, fields }) => [line, fields[1]])).toEqual([
    [1, 'b'],
    [2, 'c'],
    [4, 'e'],
  ]);
});

it.each([
  ['a,b\n1,"cut', 2],
  ['a,b\n1,"x" y\n2,3\n', 2],
  ['a,b\n1,2\n\n"x"y",3\n4,5\n', 4],
  [`a,b\n${'1,2\n'.repeat(100_000)}3,"cut`, 100_002],
])('names the line of a broken quote', (text, line) => {
  const read = (): unknown => recordsOf(text);

  expect(read).toThrow(BrokenQuoteError);
  try {
    read();
  } catch (error) {
    expect((error as BrokenQuoteError).line).toBe(line);
  }
});

it('finds the first record below blank lines', () => {
  expect(firstRecord('\n  \n\na,"b\nc"\nd,e', ',')).toEqual({ line: 4, fields: ['a', 'b\nc'] });
  expect(firstRecord(' \n\n', ',')).toBeUndefined();
});

it('reads every kind of line end as one', () => {
  const text = (bytes: string) => {
    const decoded = decodeText(Buffer.from(bytes));
    return 'text' in decoded ? decoded.text : decoded.problem.code;
  };

  expect(text('a\r\nb\rc\nd')).toBe('a\nb\nc\nd');
  expect(text('\uFEFFa')).toBe('a');
});
