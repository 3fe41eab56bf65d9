/** What was stored, written out again and imported again, is already there: nothing is lost or changed on the way. */
import * as fc from 'fast-check';
import {
  MEASUREMENT_TEXT_COLUMNS,
  measurementAsText,
  paths,
  SEXES,
  TEMPLATE_COLUMNS,
  type Measurement,
  type MeasurementTextField,
  type Patient,
  type TemplateColumn,
} from '@/shared/contract';
import { toCsv } from '@/server/reports/csv';
import { csvOf, type CsvRow } from '@/tests/support/biometry-csv';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';
import { confirm, rowsOf, upload } from './import-support';

let test: TestApp;
let technician: SignedIn;
beforeAll(async () => {
  test = await startTestApp();
  technician = await test.signInAs('technician');
});
afterAll(() => test.close());

const number = (min: number, max: number, digits: number) =>
  fc
    .integer({ min: Math.ceil(min * 10 ** digits), max: Math.floor(max * 10 ** digits) })
    .map((n) => (n / 10 ** digits).toFixed(digits));
const maybe = (text: fc.Arbitrary<string>) => fc.option(text, { nil: '' });
const word = fc
  .string({ unit: 'grapheme', minLength: 1, maxLength: 30 })
  .map((text) => text.replace(/\p{C}/gu, '').trim())
  .filter((text) => text !== '' && text.length <= 100);
const free = fc.oneof(
  word,
  fc.constantFrom('', '=1+1', '-2', '+x', '@me', 'a "quoted" b', 'semi;colon, comma', "'t", '"'),
);
const day = (from: string, to: string) =>
  fc
    .date({ min: new Date(from), max: new Date(to), noInvalidDate: true })
    .map((date) => date.toISOString().slice(0, 10));

/** Flat not steeper than steep; as powers with an index, as radii, or as both. */
const cornea: fc.Arbitrary<CsvRow> = fc
  .record({
    flat: fc.integer({ min: 3800, max: 4700 }),
    cylinder: fc.integer({ min: 0, max: 500 }),
    kind: fc.integer({ min: 0, max: 2 }),
    index: fc.constantFrom('1.3375', '1.332', '1,336'),
  })
  .map(({ flat, cylinder, kind, index }) => {
    const scale = (Number(index.replace(',', '.')) - 1) * 1000;
    const [flatD, steepD] = [flat / 100, (flat + cylinder) / 100];
    const powers = { flat_k_d: String(flatD), steep_k_d: String(steepD), keratometric_index: index };
    const radii = {
      flat_radius_mm: (scale / flatD).toFixed(3),
      steep_radius_mm: (scale / steepD).toFixed(3),
    };
    const none = { flat_k_d: '', steep_k_d: '', keratometric_index: '' };
    return [powers, { ...none, ...radii }, { ...powers, ...radii }][kind] as CsvRow;
  });

const validRow: fc.Arbitrary<CsvRow> = fc
  .record({
    identity: fc.record({
      family_name: word,
      given_name: word,
      birth_date: day('1900-01-01', '2000-01-01'),
      sex: fc.constantFrom(...SEXES),
    }),
    rest: fc.record({
      side: fc.constantFrom('right', 'left', 'RIGHT'),
      measured_at: day('2000-01-02', '2026-03-02'),
      method: fc.constantFrom('optical', 'immersion', 'contact', 'Optical'),
      device: free,
      axial_length_mm: fc.oneof(number(14, 40, 2), number(14, 40, 9)),
      axial_length_sd_mm: maybe(number(0, 2, 3)),
      flat_axis_deg: fc.constant(''),
      steep_axis_deg: maybe(number(0, 180, 1)),
      lens_thickness_mm: maybe(number(2, 5, 2)),
      corneal_thickness_um: maybe(number(250, 900, 0)),
      white_to_white_mm: maybe(number(8, 15, 1).map((text) => text.replace('.', ','))),
      pupil_mm: maybe(number(0.5, 10, 1)),
      operator: free,
      remarks: fc.oneof(free, fc.constant('line\nline')),
    }),
    depth: fc.constantFrom(
      { acd_mm: '', acd_from: '' },
      { acd_mm: '3.07', acd_from: 'endothelium' },
      { acd_mm: '', acd_from: 'epithelium' },
    ),
    cornea,
  })
  .map(({ identity, rest, depth, cornea: k }) => ({ ...identity, ...rest, ...depth, ...k }));

let runs = 0;

it('holds for any valid rows', async () => {
  await fc.assert(
    fc.asyncProperty(fc.array(validRow, { minLength: 1, maxLength: 20 }), async (rows) => {
      runs += 1;
      const named = rows.map((row, index) => ({ ...row, record_number: `P${runs}-${index}` }));
      const first = await upload(test, technician, csvOf(named));
      expect(first.counts).toMatchObject({ created: rows.length, refused: 0 });
      await confirm(test, technician, first.id);

      const again = await upload(test, technician, await exported(first.id));

      expect(again.counts).toEqual({ created: 0, alreadyThere: rows.length, refused: 0, newPatients: 0 });
    }),
    { numRuns: 12, endOnFailure: true },
  );
}, 60_000);

/** The stored rows of an import as a file of the template. */
async function exported(importId: string): Promise<Buffer> {
  const rows = await rowsOf(technician, importId);
  const records = await Promise.all(
    rows.map(async ({ measurementId, patientId }) => {
      const measurement = (await technician.get(paths.measurement(String(measurementId))))
        .body as Measurement;
      const patient = (await technician.get(paths.patient(String(patientId)))).body as Patient;
      return recordOf(patient, measurement);
    }),
  );
  return toCsv({ columns: TEMPLATE_COLUMNS, rows: records });
}

function recordOf(patient: Patient, { side, values }: Measurement): string[] {
  const text = measurementAsText(values);
  const byColumn: Partial<Record<TemplateColumn, string>> = {
    record_number: patient.recordNumber,
    family_name: patient.familyName,
    given_name: patient.givenName,
    birth_date: patient.birthDate,
    sex: patient.sex,
    side,
  };
  for (const [field, column] of Object.entries(MEASUREMENT_TEXT_COLUMNS))
    byColumn[column] = text[field as MeasurementTextField];
  return TEMPLATE_COLUMNS.map((column) => byColumn[column] ?? '');
}
