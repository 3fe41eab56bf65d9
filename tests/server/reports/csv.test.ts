import { withoutFormulaEscape } from '@/server/csv/formula-text';
import { toCsv } from '@/server/reports/csv';

const lines = (rows: (string | number | null)[][]): string[] =>
  toCsv({ columns: ['a'], rows })
    .toString('utf8')
    .split('\r\n')
    .slice(1, -1);

it('writes header, CRLF and UTF-8', () => {
  expect(toCsv({ columns: ['name', 'D'], rows: [['Ünvented', -1.25]] }).toString('utf8')).toBe(
    'name,D\r\nÜnvented,-1.25\r\n',
  );
});

it.each([
  ['=1+1', `"'=1+1"`],
  ['+1+1', `"'+1+1"`],
  ['-1+1', `"'-1+1"`],
  ['@SUM(A1)', `"'@SUM(A1)"`],
  ['=1\n+1', `"'=1\n+1"`],
  ["'=1", `"''=1"`],
])('makes %j harmless', (text, written) => {
  expect(lines([[text]])).toEqual([written]);
});

it('leaves numbers and other text alone', () => {
  expect(lines([[-1.25], ['-1.25'], ['+2,5'], ['-'], ["'t Invented"], [null], ['a=b']])).toEqual([
    '-1.25',
    '-1.25',
    '"+2,5"',
    `"'-"`,
    "'t Invented",
    '',
    'a=b',
  ]);
});

it('can be undone', () => {
  for (const text of ['=1+1', "'=1", "''@x", "'t Invented", '-1.25', '', "'"]) {
    const [written = ''] = lines([[text]]);
    const read = written.replace(/^"|"$/g, '');
    expect(withoutFormulaEscape(read)).toBe(text);
  }
});
