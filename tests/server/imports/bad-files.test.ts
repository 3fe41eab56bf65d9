/** Files and rows that must be refused: the message names row and column, and nothing is stored. */
import { connect } from 'node:net';
import type { AddressInfo } from 'node:net';
import * as fc from 'fast-check';
import { IMPORT_MAX_BYTES, IMPORT_MAX_ROWS, paths, TEMPLATE_COLUMNS } from '@/shared/contract';
import { ImportModel } from '@/server/db/models/import';
import { MeasurementModel } from '@/server/db/models/measurement';
import { PatientModel } from '@/server/db/models/patient';
import { csvOf, GOOD_ROW, type CsvRow } from '@/tests/support/biometry-csv';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';
import { confirm, postFile, rowsOf, upload } from './import-support';

let test: TestApp;
let technician: SignedIn;

beforeAll(async () => {
  test = await startTestApp();
  technician = await test.signInAs('technician');
});
afterAll(() => test.close());

const HEADER = TEMPLATE_COLUMNS.join(',');
const lineOf = (row: CsvRow): string =>
  TEMPLATE_COLUMNS.map((column) => row[column] ?? GOOD_ROW[column]).join(',');
const GOOD_LINE = lineOf({});

async function expectNothingStored(): Promise<void> {
  expect(await MeasurementModel.count()).toBe(0);
  expect(await PatientModel.count()).toBe(0);
}

describe('a file that is refused as a whole', () => {
  const latin1 = Buffer.from(`${HEADER}\r\n${lineOf({ family_name: 'Müller' })}\r\n`, 'latin1');
  const cases: [string, Buffer | string, { code: string; path?: string; message: string }][] = [
    ['is empty', '', { code: 'empty', message: 'The file is empty' }],
    ['holds only blank lines', '\uFEFF \r\n\r\n', { code: 'empty', message: 'The file is empty' }],
    [
      'holds only the header',
      `${HEADER}\r\n\r\n`,
      { code: 'no-rows', message: 'The file has a header and no rows below it' },
    ],
    [
      'has another header',
      'name,length\nx,23\n',
      {
        code: 'wrong-header',
        message: `The first line does not name the columns of the template: ${TEMPLATE_COLUMNS.join(', ')}`,
      },
    ],
    [
      'misses a column',
      `${HEADER.replace(',remarks', '')}\n${GOOD_LINE.slice(0, -1)}\n`,
      { code: 'missing-column', path: 'remarks', message: 'The column remarks is missing' },
    ],
    [
      'has an unknown column',
      `${HEADER},colour\n${GOOD_LINE},blue\n`,
      { code: 'unknown-column', path: 'colour', message: 'The column "colour" is not in the template' },
    ],
    [
      'names a column twice',
      `${HEADER},flat_k_d\n${GOOD_LINE},43\n`,
      { code: 'duplicate-column', path: 'flat_k_d', message: 'The column flat_k_d stands there twice' },
    ],
    [
      'has a column without a name',
      `${HEADER},\n${GOOD_LINE},\n`,
      { code: 'unknown-column', message: 'Column 27 has no name' },
    ],
    [
      'is UTF-16',
      Buffer.from(`\uFEFF${HEADER}`, 'utf16le'),
      { code: 'not-text', message: 'The file is UTF-16: save it as CSV in UTF-8' },
    ],
    [
      'is not UTF-8',
      latin1,
      { code: 'not-utf8', message: 'The file is not UTF-8: line 2 cannot be read. Save it as CSV in UTF-8' },
    ],
    [
      'is a spreadsheet',
      Buffer.from('PK\u0003\u0004rest of an archive', 'latin1'),
      {
        code: 'not-text',
        message: 'This is a spreadsheet or an archive, not a CSV file: export the sheet as CSV in UTF-8',
      },
    ],
    [
      'is binary',
      Buffer.from([0x89, 0x50, 0x0a, 0x00, 0x01, 0xff]),
      { code: 'not-text', message: 'The file is not text: NUL byte in line 2' },
    ],
    [
      'holds a NUL byte',
      `${HEADER}\n${GOOD_LINE}\n${lineOf({ remarks: 'a\u0000b' })}\n`,
      { code: 'not-text', message: 'The file is not text: NUL byte in line 3' },
    ],
    [
      'is cut off inside a quoted field',
      `${HEADER}\n${GOOD_LINE}\n${lineOf({ remarks: '"cut' })}`,
      {
        code: 'broken-quote',
        message:
          'A quoted field that begins in line 3 does not end properly: the file is cut off, or a quote inside a field is not doubled',
      },
    ],
    [
      'has a quote inside a quoted field that is not doubled',
      `${HEADER}\n${lineOf({ remarks: '"a "b" c"' })}\n${GOOD_LINE}\n`,
      {
        code: 'broken-quote',
        message:
          'A quoted field that begins in line 2 does not end properly: the file is cut off, or a quote inside a field is not doubled',
      },
    ],
  ];

  it.each(cases)('%s', async (_name, bytes, problem) => {
    const checked = await upload(test, technician, bytes);
    const confirmed = await technician.post(paths.importConfirm(checked.id));

    expect(checked.status).toBe('refused');
    expect(checked.problems).toEqual([{ path: 'file', ...problem }]);
    expect(confirmed.status).toBe(409);
    expect(await rowsOf(technician, checked.id)).toEqual([]);
    await expectNothingStored();
  });

  it('names everything that is wrong with a header', async () => {
    const checked = await upload(
      test,
      technician,
      `${HEADER.replace('sex', 'gender').replace('side', 'sex')}\nx\n`,
    );

    expect(checked.problems.map(({ code, path }) => [code, path])).toEqual([
      ['missing-column', 'side'],
      ['unknown-column', 'gender'],
    ]);
  });

  it('has more rows than allowed', async () => {
    const lines = Array.from({ length: 51_000 }, () => GOOD_LINE);
    const checked = await upload(test, technician, [HEADER, ...lines].join('\n'));

    expect(IMPORT_MAX_ROWS).toBe(50_000);
    expect(checked.problems).toEqual([
      {
        path: 'file',
        code: 'too-many-rows',
        message: 'The file has more than 50,000 rows: split it into smaller files',
      },
    ]);
    await expectNothingStored();
  });

  it('is larger than allowed: it is not even taken', async () => {
    const before = await ImportModel.count();
    const posted = await postFile(test, technician, Buffer.alloc(IMPORT_MAX_BYTES + 1, 'a'));

    expect([posted.status, posted.body.type]).toEqual([413, 'urn:landfall:problem:too-large']);
    expect(await ImportModel.count()).toBe(before);
  });
});

describe('a row that is refused', () => {
  const cases: [string, CsvRow, { column: string; message: string }][] = [
    [
      'axial length without decimal mark',
      { axial_length_mm: '2350' },
      {
        column: 'axial_length_mm',
        message:
          'Axial length must lie between 14 and 40 mm; 2350 looks like 23.50 mm without its decimal mark',
      },
    ],
    [
      'radius in a dioptre column',
      { flat_k_d: '7.8' },
      {
        column: 'flat_k_d',
        message:
          'Flat keratometry must lie between 25 and 75 D; 7.8 looks like a radius in mm, this field takes a power in dioptres',
      },
    ],
    [
      'dioptres in a radius column',
      { flat_radius_mm: '43' },
      {
        column: 'flat_radius_mm',
        message:
          'Flat radius must lie between 4.5 and 13.5 mm; 43 looks like a power in dioptres, this field takes a radius in mm',
      },
    ],
    [
      'depth in µm',
      { acd_mm: '3100' },
      { column: 'acd_mm', message: 'Anterior chamber depth must lie between 1 and 6 mm; 3100 looks like µm' },
    ],
    [
      'thickness in mm',
      { corneal_thickness_um: '0.54' },
      {
        column: 'corneal_thickness_um',
        message: 'Corneal thickness must lie between 250 and 900 µm; 0.54 looks like mm',
      },
    ],
    [
      'flat and steep swapped',
      { flat_k_d: '44.10', steep_k_d: '43.25' },
      {
        column: 'flat_k_d',
        message: 'Flat keratometry 44.1 D is steeper than steep 43.25 D: are the two swapped?',
      },
    ],
    ['no side', { side: '' }, { column: 'side', message: 'Side is missing: write right or left' }],
    [
      'a side in abbreviation',
      { side: 'OS' },
      { column: 'side', message: 'Side "OS" is unknown: write right or left' },
    ],
    [
      'no axial length',
      { axial_length_mm: '' },
      { column: 'axial_length_mm', message: 'Axial length is missing' },
    ],
    [
      'no keratometric index',
      { keratometric_index: '' },
      {
        column: 'keratometric_index',
        message:
          'Keratometric index is missing: without it a power in dioptres is no radius (1.3375 is usual, see the device); or give radii',
      },
    ],
    [
      'no reference of the depth',
      { acd_from: '' },
      {
        column: 'acd_from',
        message: 'Say where the anterior chamber depth was measured from: epithelium or endothelium',
      },
    ],
    [
      'a date that does not exist',
      { measured_at: '2026-02-30' },
      {
        column: 'measured_at',
        message: '"2026-02-30" is not a date of the calendar: write it as YYYY-MM-DD',
      },
    ],
    [
      'a date in the future',
      { measured_at: '2026-03-03' },
      { column: 'measured_at', message: '2026-03-03 lies in the future' },
    ],
    [
      'a date before the birth',
      { measured_at: '1950-04-02' },
      { column: 'measured_at', message: '1950-04-02 lies before the birth on 1950-04-03' },
    ],
    [
      'an impossible birth date',
      { birth_date: '1950-02-29' },
      { column: 'birth_date', message: '"1950-02-29" is not a date of the calendar: write it as YYYY-MM-DD' },
    ],
    [
      'a name of 10,000 characters',
      { family_name: 'x'.repeat(10_000) },
      { column: 'family_name', message: 'Family name is longer than 100 characters' },
    ],
    [
      'control characters',
      { given_name: 'A\u0007da' },
      { column: 'given_name', message: 'Given name contains control characters' },
    ],
    [
      'no record number',
      { record_number: ' ' },
      { column: 'record_number', message: 'Record number is missing' },
    ],
    [
      'axes that do not fit',
      { flat_axis_deg: '85', steep_axis_deg: '85' },
      {
        column: 'steep_axis_deg',
        message:
          'Flat axis 85° and steep axis 85° are 0° apart and should be 90°: is one axis written in both places?',
      },
    ],
  ];

  it.each(cases)('%s', async (_name, change, problem) => {
    const { id, counts } = await upload(test, technician, csvOf([change]));
    const [row] = await rowsOf(technician, id);
    await confirm(test, technician, id);

    expect(counts).toEqual({ created: 0, alreadyThere: 0, refused: 1, newPatients: 0 });
    expect(row).toMatchObject({ row: 2, outcome: 'refused', patientId: null, measurementId: null });
    expect(row?.problems).toEqual([expect.objectContaining(problem)]);
    await expectNothingStored();
  });

  it('shows a long value shortened', async () => {
    const { id } = await upload(test, technician, csvOf([{ remarks: 'x'.repeat(10_000) }]));

    expect((await rowsOf(technician, id))[0]?.problems[0]?.value).toBe(`${'x'.repeat(100)}…`);
  });

  it('has too few or too many fields', async () => {
    const text = `${HEADER}\n${GOOD_LINE},x\n${GOOD_LINE.slice(0, -1)}\n${GOOD_LINE.replace('23.51', '23,51')}\n`;
    const { id } = await upload(test, technician, text);

    expect((await rowsOf(technician, id)).map(({ row, problems }) => [row, problems[0]?.message])).toEqual([
      [2, expect.stringContaining('The row has 27 fields and the header 26')],
      [3, 'The row has 25 fields and the header 26'],
      [
        4,
        'The row has 27 fields and the header 26: in a comma-separated file a number with a decimal comma stands in quotes',
      ],
    ]);
  });

  it('takes a quoted decimal comma in a comma-separated file', async () => {
    const { counts } = await upload(test, technician, csvOf([{ axial_length_mm: '23,51' }]));

    expect(counts.created).toBe(1);
  });
});

describe('any bytes at all', () => {
  const damaged = fc
    .record({ at: fc.nat(), remove: fc.nat({ max: 40 }), put: fc.uint8Array({ maxLength: 20 }) })
    .map(({ at, remove, put }) => {
      const good = Buffer.from(csvOf([{}, { side: 'left' }, { record_number: 'R-2', remarks: 'a "b"' }]));
      const from = at % good.length;
      return Buffer.concat([good.subarray(0, from), put, good.subarray(from + remove)]);
    });

  it('are checked without a failure on our side', async () => {
    await fc.assert(
      fc.asyncProperty(fc.oneof(damaged, fc.uint8Array({ maxLength: 300 })), async (bytes) => {
        const checked = await upload(test, technician, Buffer.from(bytes));

        expect(['ready', 'refused']).toContain(checked.status);
        expect(checked.problems.map(({ code }) => code)).not.toContain('internal');
        expect(checked.status === 'refused').toBe(checked.problems.length > 0);
      }),
      { numRuns: 60, endOnFailure: true },
    );
    await expectNothingStored();
  }, 60_000);
});

describe('an upload that is cut off', () => {
  let port: number;
  let stop: () => void;
  beforeAll(async () => {
    const server = test.app.listen(0);
    await new Promise((resolve) => server.once('listening', resolve));
    port = (server.address() as AddressInfo).port;
    stop = () => server.close();
  });
  afterAll(() => stop());

  const body = [
    '--edge',
    'Content-Disposition: form-data; name="file"; filename="cut.csv"',
    'Content-Type: text/csv',
    '',
    csvOf([{}]),
  ].join('\r\n');

  /** Sends a request that promises `length` bytes, then closes. Resolves with what came back. */
  const send = (text: string, length: number): Promise<string> =>
    new Promise((resolve) => {
      let reply = '';
      const socket = connect(port, '127.0.0.1', () => {
        socket.write(
          `POST ${paths.imports()} HTTP/1.1\r\nHost: localhost\r\nAuthorization: Bearer ${technician.accessToken}\r\n` +
            `Content-Type: multipart/form-data; boundary=edge\r\nContent-Length: ${length}\r\nConnection: close\r\n\r\n${text}`,
        );
        setTimeout(() => socket.end(), 300);
      });
      socket.on('data', (chunk) => (reply += chunk.toString()));
      socket.on('close', () => resolve(reply));
      socket.on('error', () => undefined);
    });

  it('leaves nothing when the connection ends early', async () => {
    const before = await ImportModel.count();
    await send(body, Buffer.byteLength(body) + 1000);

    await test.deps.background.idle();
    expect(await ImportModel.count()).toBe(before);
  });

  it('is refused when the form itself does not end', async () => {
    const before = await ImportModel.count();
    const reply = await send(body, Buffer.byteLength(body));

    expect(reply).toMatch(/^HTTP\/1\.1 400 /);
    expect(await ImportModel.count()).toBe(before);
  });
});
