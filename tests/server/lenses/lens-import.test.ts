/** The catalogue from a file: checked line by line, stored as a whole or not at all. */
import request from 'supertest';
import { LENS_COLUMNS, paths, type LensImportResult } from '@/shared/contract';
import { AuditEntryModel } from '@/server/db/models/audit-entry';
import { LensModel } from '@/server/db/models/lens';
import { toCsv } from '@/server/reports/csv';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let administrator: SignedIn;

beforeEach(async () => {
  test = await startTestApp();
  administrator = await test.signInAs('administrator');
});
afterEach(() => test.close());

type Line = Partial<Record<(typeof LENS_COLUMNS)[number], string>>;
const GOOD: Line = {
  name: 'Invented One',
  kind: 'monofocal',
  toric: 'no',
  design: 'one-piece',
  power_ranges_d: '5:10:1 10:30:0.5',
  constants_origin: 'optical',
  constants_source: 'invented for the tests',
  constants_dated: '2025-01-01',
  a_constant: '118.9',
  haigis_a0_mm: '1.3',
  haigis_a1: '0.4',
  haigis_a2: '0.1',
};
const fileOf = (...lines: Line[]): Buffer =>
  toCsv({
    columns: LENS_COLUMNS,
    rows: lines.map((line) => LENS_COLUMNS.map((column) => ({ ...GOOD, ...line })[column] ?? '')),
  });

const send = (person: SignedIn, bytes: Buffer | string, query = '') =>
  request(test.app)
    .post(paths.lensImport() + query)
    .set('Authorization', `Bearer ${person.accessToken}`)
    .attach('file', Buffer.from(bytes), 'lenses.csv');
const check = async (...lines: Line[]): Promise<LensImportResult> => {
  const reply = await send(administrator, fileOf(...lines), '?dryRun=1');
  expect(reply.status).toBe(200);
  return reply.body as LensImportResult;
};

const ULTRASOUND: Line = {
  constants_origin: 'ultrasound',
  a_constant: '118,4',
  haigis_a0_mm: '',
  haigis_a1: '',
  haigis_a2: '',
  pacd_mm: '5.2',
};

it('says what would happen and stores nothing', async () => {
  const result = await check({}, ULTRASOUND, { name: 'Toric', toric: 'yes', cylinder_steps_d: '1 1,5 2.25' });

  expect(result.counts).toEqual({ created: 3, changed: 0, alreadyThere: 0, refused: 0 });
  expect(result.rows[0]).toEqual({
    row: 2,
    name: 'Invented One',
    outcome: 'created',
    summary: 'new model',
    problems: [],
  });
  expect(await LensModel.count()).toBe(0);
});

it('stores models with the constants of both origins, once', async () => {
  const stored = await send(administrator, fileOf({}, ULTRASOUND));

  expect([stored.status, stored.body.isStored]).toEqual([200, true]);
  const { body } = await administrator.get(paths.lenses());
  expect(body.items).toMatchObject([
    {
      name: 'Invented One',
      powerRanges: [
        { fromD: 5, toD: 10, stepD: 1 },
        { fromD: 10, toD: 30, stepD: 0.5 },
      ],
      constants: [
        { formula: 'srkt', origin: 'optical', values: { aConstant: 118.9 } },
        { formula: 'haigis', origin: 'optical', values: { a0Mm: 1.3, a1: 0.4, a2: 0.1 } },
        { formula: 'srkt', origin: 'ultrasound', values: { aConstant: 118.4 } },
        { formula: 'hofferQ', origin: 'ultrasound', values: { pAcdMm: 5.2 } },
      ],
    },
  ]);
  const again = await send(administrator, fileOf({}, ULTRASOUND));
  expect(again.body.counts).toEqual({ created: 0, changed: 0, alreadyThere: 2, refused: 0 });
  expect((await administrator.get(paths.lenses())).body.items[0].version).toBe(0);
  expect(await AuditEntryModel.count({ where: { action: 'lens.create' } })).toBe(1);
  expect(await AuditEntryModel.count({ where: { action: 'lens.import' } })).toBe(2);
});

it('changes what differs, and leaves constants of an origin that the file does not mention', async () => {
  await send(administrator, fileOf({}, ULTRASOUND));
  const change = { a_constant: '119.2', design: 'three-piece' };
  const checked = await check(change);
  await send(administrator, fileOf(change));

  expect(checked.rows[0]).toMatchObject({ outcome: 'changed', summary: 'changes design, constants' });
  const [lens] = (await administrator.get(paths.lenses())).body.items;
  expect(lens).toMatchObject({ design: 'three-piece', version: 1 });
  expect(lens.constants.map(({ values }: { values: object }) => values)).toEqual([
    { aConstant: 119.2 },
    { a0Mm: 1.3, a1: 0.4, a2: 0.1 },
    { aConstant: 118.4 },
    { pAcdMm: 5.2 },
  ]);
});

it.each<[Line, string, string]>([
  [{ name: '' }, 'name', 'Name is missing'],
  [
    { kind: 'bifocal' },
    'kind',
    '"bifocal" is none of: monofocal, monofocal-plus, extended-depth-of-focus, multifocal',
  ],
  [{ toric: 'maybe' }, 'toric', '"maybe" is none of: yes, no'],
  [{ design: '' }, 'design', '"" is none of: one-piece, three-piece, anterior-chamber'],
  [{ power_ranges_d: '' }, 'power_ranges_d', 'Give at least one range of powers'],
  [
    { power_ranges_d: '10-30' },
    'power_ranges_d',
    '"10-30" is no range: write from:to:step, for example 10:30:0.5',
  ],
  [{ power_ranges_d: '10:x:0.5' }, 'power_ranges_d', '"x" is not a number'],
  [{ power_ranges_d: '10:30:0.3' }, 'power_ranges_d', 'The step does not divide the range'],
  [
    { cylinder_steps_d: '1 2' },
    'cylinder_steps_d',
    'A toric model has cylinder steps, and only a toric model',
  ],
  [{ constants_origin: 'laser' }, 'constants_origin', '"laser" is none of: optical, ultrasound'],
  [{ constants_origin: '' }, 'constants_origin', 'Say which constants these are: optical or ultrasound'],
  [{ constants_source: '' }, 'constants_source', 'Say where the constants come from'],
  [{ constants_dated: '' }, 'constants_dated', 'Say which day the constants are of, as YYYY-MM-DD'],
  [{ constants_dated: '1.2.2025' }, 'constants_dated', 'Write the date as YYYY-MM-DD'],
  [{ a_constant: '11.89' }, 'a_constant', 'Must lie between 100 and 130'],
  [{ a_constant: 'x' }, 'a_constant', '"x" is not a number'],
  [{ haigis_a1: '' }, 'haigis_a1', 'This constant is missing beside the others of its formula'],
])('refuses %j', async (change, column, message) => {
  const result = await check(change, { name: 'Good' });

  expect(result.counts).toMatchObject({ created: 1, refused: 1 });
  expect(result.rows[0]?.problems).toContainEqual(expect.objectContaining({ column, message }));
  const stored = await send(administrator, fileOf(change, { name: 'Good' }));
  expect(stored.status).toBe(422);
  expect(stored.body.errors).toContainEqual(expect.objectContaining({ path: `rows.2.${column}`, message }));
  expect(await LensModel.count()).toBe(0);
});

it('refuses lines of one model that contradict each other', async () => {
  const { rows } = await check({}, { ...ULTRASOUND, design: 'three-piece' }, {});

  expect(
    rows.map(({ row, outcome, problems }) => [row, outcome, problems.map(({ message }) => message)]),
  ).toEqual([
    [2, 'refused', []],
    [3, 'refused', ['Differs from row 2 of the same model']],
    [4, 'refused', ['Row 2 gives constants of this origin already']],
  ]);
});

it('refuses a file that is no catalogue', async () => {
  const checked = await send(administrator, 'a,b\n1,2\n', '?dryRun=1');
  const stored = await send(administrator, 'a,b\n1,2\n');

  expect(checked.body.problems[0].code).toBe('wrong-header');
  expect([stored.status, stored.body.errors[0].code]).toEqual([422, 'wrong-header']);
  const template = await administrator.get(paths.lensTemplate());
  expect(template.text).toBe(`${LENS_COLUMNS.join(',')}\r\n`);
  expect((await send(administrator, template.text, '?dryRun=1')).body.problems[0].code).toBe('no-rows');
  expect((await send(administrator, Buffer.alloc(1024 * 1024 + 1, 'a'))).status).toBe(413);
});

it('is for those who may', async () => {
  const surgeon = await test.signInAs('surgeon');

  expect((await request(test.app).post(paths.lensImport())).status).toBe(401);
  expect((await send(surgeon, fileOf({}))).status).toBe(403);
  expect((await surgeon.get(paths.lensTemplate())).status).toBe(200);
});
