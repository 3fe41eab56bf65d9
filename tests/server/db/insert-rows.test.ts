import { AuditEntryModel } from '@/server/db/models/audit-entry';
import { EyeModel } from '@/server/db/models/eye';
import { MeasurementModel } from '@/server/db/models/measurement';
import { insertRows } from '@/server/db/insert-rows';
import { anEntry, register } from '@/tests/support/patients';
import { readMeasurement, type MeasurementValues } from '@/shared/contract';
import { startTestApp, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
beforeAll(async () => (test = await startTestApp()));
afterAll(() => test.close());

const valuesOf = (): MeasurementValues => {
  const reading = readMeasurement(anEntry().text, { today: '2026-03-02' });
  if ('problems' in reading) throw new Error('The entry should be good');
  return reading.values;
};

const insert = (
  model: typeof MeasurementModel,
  attributes: string[],
  rows: (string | number | null | object)[][],
) => test.deps.db.inWrite((transaction) => insertRows(model, { attributes, rows, transaction }));

it('stores every decimal exactly as it went in, also where SQLite misreads its text', async () => {
  const technician = await test.signInAs('technician');
  const { id: patientId } = await register(technician);
  const eye = await EyeModel.findOne({ where: { patientId }, rejectOnEmpty: true });
  const values = valuesOf();
  // 7.548646835 is one of those that SQLite reads wrongly.
  const lengths = [
    7.548646835,
    ...Array.from({ length: 5000 }, (_x, n) => Math.round((14 + n / 193) * 1e9) / 1e9),
  ];
  const fixed = [
    'measuredAt',
    'method',
    'device',
    'operator',
    'remarks',
    'flatRadiusMm',
    'steepRadiusMm',
  ] as const;
  const rows = lengths.map((length, index) => [
    `m-${index}`,
    eye.id,
    `hash-${index}`,
    technician.id,
    '2026-03-02T09:00:00.000Z',
    ...fixed.map((field) => values[field]),
    length,
    index % 2 === 0 ? null : { column: 'text' },
  ]);

  await insert(
    MeasurementModel,
    ['id', 'eyeId', 'contentHash', 'createdBy', 'createdAt', ...fixed, 'axialLengthMm', 'raw'],
    rows,
  );

  const stored = await MeasurementModel.findAll();
  const byId = new Map(stored.map((row) => [row.id, row]));
  expect(lengths.filter((length, index) => byId.get(`m-${index}`)?.axialLengthMm !== length)).toEqual([]);
  expect(byId.get('m-0')?.raw).toBeNull();
  expect(byId.get('m-1')?.raw).toEqual({ column: 'text' });
});

it('refuses a number that it could not store exactly', async () => {
  await expect(insert(MeasurementModel, ['axialLengthMm'], [[1 / 3]])).rejects.toThrow(
    'more than nine decimals',
  );
});

it('refuses an attribute that the model does not have', async () => {
  const write = test.deps.db.inWrite((transaction) =>
    insertRows(AuditEntryModel, { attributes: ['nonsense'], rows: [], transaction }),
  );

  await expect(write).rejects.toThrow('has no attribute nonsense');
});
