/** Upload, dry run and storing of a biometry file, by HTTP on a real database. */
import request from 'supertest';
import { paths, type BiometryImport } from '@/shared/contract';
import { AuditEntryModel } from '@/server/db/models/audit-entry';
import { recoverImports } from '@/server/features/imports/import.service';
import { EyeModel } from '@/server/db/models/eye';
import { ImportModel } from '@/server/db/models/import';
import { MeasurementModel } from '@/server/db/models/measurement';
import { PatientModel } from '@/server/db/models/patient';
import { csvOf, manyRows } from '@/tests/support/biometry-csv';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';
import { confirm, postFile, rowsOf, upload } from './import-support';

let test: TestApp;
let technician: SignedIn;
let surgeon: SignedIn;

beforeEach(async () => {
  test = await startTestApp();
  technician = await test.signInAs('technician');
  surgeon = await test.signInAs('surgeon');
});
afterEach(() => test.close());

const countAll = async () => ({
  patients: await PatientModel.count(),
  eyes: await EyeModel.count(),
  measurements: await MeasurementModel.count(),
});
const NOTHING = { patients: 0, eyes: 0, measurements: 0 };
const audits = (action: string) => AuditEntryModel.findAll({ where: { action } });

describe('the dry run', () => {
  it('says what would be created and stores nothing of it', async () => {
    const checked = await upload(test, technician, csvOf([{}, { side: 'left' }, { record_number: 'R-2' }]));

    expect(checked).toMatchObject({
      status: 'ready',
      readAs: 'comma, decimal point, UTF-8',
      counts: { created: 3, alreadyThere: 0, refused: 0, newPatients: 2 },
      progress: { done: 3, total: 3 },
      uploadedBy: technician.displayName,
      storedAt: null,
      sameFileAs: null,
    });
    expect(
      (await rowsOf(technician, checked.id)).map(({ row, outcome, summary }) => [row, outcome, summary]),
    ).toEqual([
      [2, 'created', 'new patient, right eye'],
      [3, 'created', 'new patient of row 2, left eye'],
      [4, 'created', 'new patient, right eye'],
    ]);
    expect(await countAll()).toEqual(NOTHING);
  });

  it('reads semicolons, decimal commas, a byte order mark, blank lines and columns in any order', async () => {
    const text = csvOf([{ axial_length_mm: '23,51', acd_mm: '3,12' }], { delimiter: ';' });
    const [header, row] = text
      .trim()
      .split('\r\n')
      .map((line) => line.split(';').reverse().join(';'));
    const checked = await upload(test, technician, `\uFEFF\r\n${header}\r\n\r\n${row}\r\n;;\r\n   \r\n`);

    expect(checked.counts).toMatchObject({ created: 1, refused: 0 });
    expect(checked.readAs).toBe('semicolon, decimal comma and point, UTF-8 with BOM');
    expect((await rowsOf(technician, checked.id))[0]?.row).toBe(4);
  });

  it('counts the lines of quoted fields, so that a row is where the message says', async () => {
    const checked = await upload(
      test,
      technician,
      csvOf([{ remarks: 'one\r\ntwo\nthree' }, { side: 'left', axial_length_mm: '2350' }]),
    );
    const [first, second] = await rowsOf(technician, checked.id);

    expect(first).toMatchObject({ row: 2, outcome: 'created' });
    expect(second).toMatchObject({
      row: 5,
      outcome: 'refused',
      recordNumber: 'R-1',
      patientName: 'Invented, Ada',
      side: 'left',
      problems: [
        {
          column: 'axial_length_mm',
          value: '2350',
          message:
            'Axial length must lie between 14 and 40 mm; 2350 looks like 23.50 mm without its decimal mark',
        },
      ],
    });
  });

  it('lists rows by outcome, page by page', async () => {
    const rows = manyRows(30).map((row, index) => (index % 10 === 0 ? { ...row, side: '' } : row));
    const { id } = await upload(test, technician, csvOf(rows));

    const refused = await technician.get(`${paths.importRows(id)}?outcome=refused&limit=2`);
    const rest = await technician.get(
      `${paths.importRows(id)}?outcome=refused&limit=2&after=${refused.body.next}`,
    );

    expect(refused.body.items.map((row: { row: number }) => row.row)).toEqual([2, 12]);
    expect(refused.body.total).toBe(3);
    expect(rest.body.items.map((row: { row: number }) => row.row)).toEqual([22]);
    expect(rest.body.next).toBeUndefined();
  });

  it('is the same when it must be worked out again from the bytes', async () => {
    const { id } = await upload(test, technician, csvOf([{}, {}, { side: 'x' }]));
    const before = await rowsOf(technician, id);
    for (const name of ['a', 'b', 'c']) await upload(test, technician, csvOf([{ remarks: name }]));

    expect(await rowsOf(technician, id)).toEqual(before);
  });
});

describe('storing', () => {
  it('stores patients, eyes and measurements once, with the way back to file and row', async () => {
    const checked = await upload(
      test,
      technician,
      csvOf([{ remarks: '=1+1' }, { side: 'left' }]),
      'from device.csv',
    );
    const stored = await confirm(test, technician, checked.id);

    expect(stored).toMatchObject({
      status: 'stored',
      storedBy: technician.displayName,
      storedAt: '2026-03-02T09:00:00.000Z',
      counts: { created: 2, alreadyThere: 0, refused: 0, newPatients: 1 },
    });
    expect(await countAll()).toEqual({ patients: 1, eyes: 2, measurements: 2 });
    const [first] = await rowsOf(technician, checked.id);
    const measurement = await surgeon.get(paths.measurement(String(first?.measurementId)));
    expect(measurement.body).toMatchObject({
      patientId: first?.patientId,
      side: 'right',
      isOfRecord: true,
      createdBy: technician.displayName,
      values: {
        axialLengthMm: 23.51,
        flatRadiusMm: 7.803468208,
        flatKD: 43.25,
        remarks: '=1+1',
        acdFrom: 'epithelium',
      },
      provenance: {
        kind: 'file',
        importId: checked.id,
        fileName: 'from device.csv',
        row: 2,
        raw: { axial_length_mm: '23.51', record_number: 'R-1', remarks: '=1+1', flat_radius_mm: '' },
      },
    });
  });

  it('leaves refused rows out and stores the others', async () => {
    const { id } = await upload(test, technician, csvOf([{}, { side: 'left', method: 'guess' }]));
    const stored = await confirm(test, technician, id);

    expect(stored.counts).toEqual({ created: 1, alreadyThere: 0, refused: 1, newPatients: 1 });
    expect(await countAll()).toEqual({ patients: 1, eyes: 2, measurements: 1 });
  });

  it('changes nothing when the same file comes again, and says so', async () => {
    const bytes = csvOf(manyRows(10));
    const first = await upload(test, technician, bytes);
    await confirm(test, technician, first.id);
    const before = await countAll();

    const again = await upload(test, technician, bytes);
    const stored = await confirm(test, technician, again.id);

    expect(again).toMatchObject({
      sameFileAs: first.id,
      counts: { created: 0, alreadyThere: 10, newPatients: 0 },
    });
    expect((await rowsOf(technician, again.id))[0]).toMatchObject({
      outcome: 'already-there',
      summary: 'the same measurement is stored since 2026-03-02',
    });
    expect(stored).toMatchObject({ status: 'stored', counts: { created: 0, alreadyThere: 10 } });
    expect(await countAll()).toEqual(before);
  });

  it('adds only what is new when the same rows come in another file', async () => {
    await confirm(test, technician, (await upload(test, technician, csvOf([{}]))).id);
    const { id } = await upload(test, technician, csvOf([{ side: 'left' }, {}], { delimiter: ';' }));

    expect((await rowsOf(technician, id)).map(({ outcome, summary }) => [outcome, summary])).toEqual([
      ['created', 'known patient, left eye'],
      ['already-there', 'the same measurement is stored since 2026-03-02'],
    ]);
    await confirm(test, technician, id);
    expect(await countAll()).toEqual({ patients: 1, eyes: 2, measurements: 2 });
  });

  it('is idempotent, and stores once when two people confirm at once', async () => {
    const other = await test.signInAs('technician');
    const { id } = await upload(test, technician, csvOf(manyRows(50)));

    const replies = await Promise.all([
      technician.post(paths.importConfirm(id)),
      other.post(paths.importConfirm(id)),
    ]);
    await test.deps.background.idle();
    const again = await other.post(paths.importConfirm(id));

    expect(replies.map(({ status }) => status)).toEqual([200, 200]);
    expect(again.body).toMatchObject({ status: 'stored', storedBy: technician.displayName });
    expect(await countAll()).toEqual({ patients: 25, eyes: 50, measurements: 50 });
    expect(await audits('import.store')).toHaveLength(1);
  });

  it('lists the stored rows with where they went, also when worked out again', async () => {
    const { id } = await upload(test, technician, csvOf([{}, {}, { side: 'x' }]));
    await confirm(test, technician, id);
    const before = await rowsOf(technician, id);
    for (const name of ['a', 'b', 'c']) await upload(test, technician, csvOf([{ remarks: name }]));
    const after = await rowsOf(technician, id);

    expect(before.map(({ outcome }) => outcome)).toEqual(['created', 'already-there', 'refused']);
    expect(after.map(({ outcome }) => outcome)).toEqual(['created', 'already-there', 'refused']);
    expect(after[0]).toMatchObject({ summary: 'stored, right eye', measurementId: before[0]?.measurementId });
  });

  it('writes an entry for the import and one per new patient', async () => {
    const { id } = await upload(test, technician, csvOf(manyRows(4)));
    await confirm(test, technician, id);

    const [entry] = await audits('import.store');
    const patients = await audits('patient.create');
    expect(entry).toMatchObject({
      actorId: technician.id,
      nounId: id,
      detail: { counts: { created: 4, alreadyThere: 0, refused: 0, newPatients: 2 } },
    });
    expect(patients.map(({ detail, actorId }) => [detail, actorId])).toEqual([
      [{ recordNumber: 'M-0', importId: id }, technician.id],
      [{ recordNumber: 'M-1', importId: id }, technician.id],
    ]);
    expect(patients[0]?.patientId).toMatch(/^[0-9a-f-]{36}$/);
    expect(await audits('import.upload')).toHaveLength(1);
  });
});

describe('one record number, one person', () => {
  it('refuses a row whose identity differs from the registered one, naming both', async () => {
    await confirm(test, technician, (await upload(test, technician, csvOf([{}]))).id);
    const { id } = await upload(test, technician, csvOf([{ birth_date: '1950-03-04', side: 'left' }]));

    expect((await rowsOf(technician, id))[0]).toMatchObject({
      outcome: 'refused',
      problems: [
        {
          column: 'birth_date',
          value: '1950-03-04',
          message:
            'Record number R-1 belongs to Invented, Ada, born 1950-04-03, female; this row says Invented, Ada, born 1950-03-04, female',
        },
      ],
    });
  });

  it('refuses every row of a record number that stands for two people in the file', async () => {
    const { id, counts } = await upload(
      test,
      technician,
      csvOf([{}, { side: 'left', given_name: 'Bea' }, { record_number: 'R-2' }]),
    );
    const message =
      'Record number R-1 stands for two people in this file: Invented, Ada, born 1950-04-03, female in row 2, Invented, Bea, born 1950-04-03, female in row 3';

    expect(counts).toEqual({ created: 1, alreadyThere: 0, refused: 2, newPatients: 1 });
    const [first, second, third] = await rowsOf(technician, id);
    expect(first?.problems).toEqual([{ column: 'given_name', value: 'Ada', message }]);
    expect(second?.problems).toEqual([{ column: 'given_name', value: 'Bea', message }]);
    expect(third?.outcome).toBe('created');
  });

  it('does not mind capitals', async () => {
    await confirm(test, technician, (await upload(test, technician, csvOf([{}]))).id);
    const { counts } = await upload(test, technician, csvOf([{ family_name: 'INVENTED', side: 'left' }]));

    expect(counts).toMatchObject({ created: 1, newPatients: 0 });
  });

  it('says when a new record has the name and birth date of another', async () => {
    await confirm(test, technician, (await upload(test, technician, csvOf([{}]))).id);
    const { id } = await upload(test, technician, csvOf([{ record_number: 'R-9' }]));

    expect((await rowsOf(technician, id))[0]?.summary).toBe(
      'new patient (record R-1 has the same name and birth date: is it the same person?), right eye',
    );
  });
});

describe('the file itself', () => {
  it('comes back byte for byte under a safe name', async () => {
    const bytes = Buffer.from(`\uFEFF${csvOf([{ family_name: 'Ünvented' }])}\r\n\r\n`);
    const { id, fileName, sizeBytes } = await upload(test, technician, bytes, '../etc/Bio "metrie" ü.csv');

    const downloaded = await surgeon.get(paths.importFile(id)).buffer(true).parse(asBuffer);

    expect(downloaded.body.equals(bytes)).toBe(true);
    expect([fileName, sizeBytes]).toEqual(['Bio metrie ü.csv', bytes.length]);
    expect(downloaded.headers['content-disposition']).toBe(
      `attachment; filename="Bio metrie _.csv"; filename*=UTF-8''Bio%20metrie%20%C3%BC.csv`,
    );
    expect(await audits('import.download')).toMatchObject([{ actorId: surgeon.id, nounId: id }]);
  });

  it('can be discarded before it is stored, and not after', async () => {
    const { id } = await upload(test, technician, csvOf([{}]));
    const discarded = await technician.post(paths.importDiscard(id));
    const confirmed = await technician.post(paths.importConfirm(id));

    expect(discarded.body.status).toBe('discarded');
    expect((await technician.post(paths.importDiscard(id))).status).toBe(200);
    expect([confirmed.status, confirmed.body.detail]).toEqual([
      409,
      'The file was discarded; upload it again to store it',
    ]);
    expect(await rowsOf(technician, id)).toEqual([]);
    const other = await upload(test, technician, csvOf([{}]));
    await confirm(test, technician, other.id);
    expect((await technician.post(paths.importDiscard(other.id))).status).toBe(409);
  });

  it('gives the template, which is refused only for having no rows', async () => {
    const template = await technician.get(paths.importTemplate());
    const checked = await upload(test, technician, template.text);

    expect(template.headers['content-type']).toBe('text/csv; charset=utf-8');
    expect(checked.problems).toEqual([
      { path: 'file', code: 'no-rows', message: 'The file has a header and no rows below it' },
    ]);
  });

  it('lists uploads newest first', async () => {
    const first = await upload(test, technician, csvOf([{}]));
    test.clock.advance(1000);
    const second = await upload(test, technician, csvOf([{ side: 'left' }]));

    const page = await surgeon.get(`${paths.imports()}?limit=1`);
    const rest = await surgeon.get(`${paths.imports()}?limit=1&after=${page.body.next}`);

    expect(page.body.items.map(({ id }: BiometryImport) => id)).toEqual([second.id]);
    expect(rest.body.items.map(({ id }: BiometryImport) => id)).toEqual([first.id]);
    expect(JSON.stringify(page.body)).not.toContain('bytes"');
  });

  it('has no demonstration file outside the demonstration', async () => {
    expect((await technician.get(paths.importDemoFile())).status).toBe(404);
  });
});

describe('home', () => {
  it('shows the technician what waits to be stored, and nobody else', async () => {
    const { id } = await upload(test, technician, csvOf([{}, { side: 'x' }]), 'waiting.csv');
    const sectionOf = async (person: SignedIn) =>
      (await person.get(paths.home())).body.sections.find(
        (section: { id: string }) => section.id === 'ready-imports',
      );

    expect(await sectionOf(technician)).toMatchObject({
      total: 1,
      items: [
        {
          title: 'waiting.csv',
          detail: `1 to create, 1 refused; uploaded by ${technician.displayName}`,
          href: `/imports/${id}`,
        },
      ],
    });
    expect(await sectionOf(surgeon)).toBeUndefined();
    await confirm(test, technician, id);
    expect((await sectionOf(technician)).total).toBe(0);
  });
});

describe('after the process ended in the middle', () => {
  it('checks anew what was being checked, and makes ready what was being stored', async () => {
    const checking = await upload(test, technician, csvOf([{}]));
    const storing = await upload(test, technician, csvOf([{ side: 'left' }]));
    await ImportModel.update({ status: 'checking', readAs: '' }, { where: { id: checking.id } });
    await ImportModel.update({ status: 'storing', storedBy: technician.id }, { where: { id: storing.id } });

    await recoverImports(test.deps);
    await test.deps.background.idle();

    expect((await technician.get(paths.import(checking.id))).body).toMatchObject({
      status: 'ready',
      readAs: 'comma, decimal point, UTF-8',
      counts: { created: 1 },
    });
    expect((await technician.get(paths.import(storing.id))).body).toMatchObject({
      status: 'ready',
      storedBy: null,
    });
    expect(await countAll()).toEqual(NOTHING);
  });

  it('is ready again when storing fails, with nothing stored', async () => {
    const { id } = await upload(test, technician, csvOf([{}, { side: 'left' }]));
    await test.deps.db.sequelize.query(
      `CREATE TRIGGER fail BEFORE INSERT ON measurements WHEN NEW.import_row = 3 BEGIN SELECT RAISE(ABORT, 'disk'); END`,
    );
    const failed = await confirm(test, technician, id);
    await test.deps.db.sequelize.query('DROP TRIGGER fail');

    expect(failed).toMatchObject({ status: 'ready', storedBy: null, storedAt: null });
    expect(await countAll()).toEqual(NOTHING);
    expect(test.log()).toContain('import.store');
    expect((await confirm(test, technician, id)).counts.created).toBe(2);
  });
});

describe('who may', () => {
  it('asks for a sign-in and for the role', async () => {
    const { id } = await upload(test, technician, csvOf([{}]));
    const counsellor = await test.signInAs('counsellor');

    expect((await request(test.app).get(paths.imports())).status).toBe(401);
    expect((await counsellor.get(paths.import(id))).status).toBe(403);
    expect((await counsellor.get(paths.importFile(id))).status).toBe(403);
    expect((await postFile(test, surgeon, csvOf([{}]))).status).toBe(403);
    expect((await surgeon.post(paths.importConfirm(id))).status).toBe(403);
    expect((await surgeon.get(paths.importRows(id))).status).toBe(200);
  });

  it('knows no other import', async () => {
    const unknown = '3f0c5f2e-8f0e-4a53-9f5e-2b3f4f6f7a11';
    for (const path of [paths.import(unknown), paths.importRows(unknown), paths.importFile(unknown)]) {
      expect((await technician.get(path)).status).toBe(404);
    }
    expect((await technician.post(paths.importConfirm(unknown))).status).toBe(404);
    expect((await technician.post(paths.importDiscard(unknown))).status).toBe(404);
    expect((await technician.get(paths.import('nonsense'))).status).toBe(404);
  });

  it('asks for the file', async () => {
    const empty = await technician.post(paths.imports());

    expect(empty.status).toBe(422);
  });
});

function asBuffer(response: request.Response, done: (error: Error | null, body: unknown) => void): void {
  const stream = response as unknown as NodeJS.ReadableStream;
  const chunks: Buffer[] = [];
  stream.on('data', (chunk: Buffer) => chunks.push(chunk));
  stream.on('end', () => done(null, Buffer.concat(chunks)));
}
