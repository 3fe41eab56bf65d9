import request from 'supertest';
import { paths, type PatientListItem } from '@/shared/contract';
import { AuditEntryModel } from '@/server/db/models/audit-entry';
import { aPatient, register } from '@/tests/support/patients';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let technician: SignedIn;
let surgeon: SignedIn;
const UNKNOWN = '3f0c5f2e-8f0e-4a53-9f5e-2b3f4f6f7a11';

beforeEach(async () => {
  test = await startTestApp();
  technician = await test.signInAs('technician');
  surgeon = await test.signInAs('surgeon');
});
afterEach(() => test.close());

const audits = (action: string) => AuditEntryModel.findAll({ where: { action } });
const find = async (search: string): Promise<string[]> => {
  const reply = await surgeon.get(`${paths.patients()}?search=${encodeURIComponent(search)}`);
  expect(reply.status).toBe(200);
  return reply.body.items.map(({ recordNumber }: PatientListItem) => recordNumber);
};

describe('registering', () => {
  it('answers with the patient, both eyes waiting for a measurement, and leaves an audit entry', async () => {
    const reply = await technician.post(paths.patients(), aPatient());

    expect(reply.status).toBe(201);
    expect(reply.headers.etag).toBe('"0"');
    expect(reply.headers.location).toBe(paths.patient(reply.body.id));
    expect(reply.body).toMatchObject({
      ...aPatient(),
      isDemo: false,
      version: 0,
      possibleDuplicates: [],
      eyes: [
        { side: 'right', stage: 'measure', waitsFor: 'Waits for a measurement' },
        { side: 'left', stage: 'measure', waitsFor: 'Waits for a measurement' },
      ],
    });
    expect(await audits('patient.create')).toMatchObject([
      { actorId: technician.id, patientId: reply.body.id, nounId: reply.body.id, version: 0 },
    ]);
  });

  it('refuses a record number that is taken, naming the patient', async () => {
    await register(technician);
    const reply = await technician.post(paths.patients(), aPatient({ familyName: 'Other' }));

    expect(reply.status).toBe(409);
    expect(reply.body.errors).toEqual([
      {
        path: 'recordNumber',
        code: 'taken',
        message: 'Record number R-100 belongs to Invented, Ada, born 1950-04-03',
      },
    ]);
  });

  it('registers a possible duplicate and says so', async () => {
    const first = await register(technician, { familyName: 'Müller' });
    const second = await register(technician, { recordNumber: 'R-101', familyName: 'MULLER' });

    expect(second.possibleDuplicates).toEqual([
      { id: first.id, recordNumber: 'R-100', familyName: 'Müller', givenName: 'Ada' },
    ]);
    expect(
      (await register(technician, { recordNumber: 'R-102', birthDate: '1950-04-04' })).possibleDuplicates,
    ).toEqual([]);
  });

  it('names each field that is wrong', async () => {
    const reply = await technician.post(paths.patients(), {
      recordNumber: ' ',
      familyName: 'x'.repeat(10_000),
      givenName: 'A\u0000',
      birthDate: '1950-02-30',
      sex: 'f',
    });

    expect(reply.status).toBe(422);
    expect(reply.body.errors.map(({ path }: { path: string }) => path)).toEqual([
      'recordNumber',
      'familyName',
      'givenName',
      'birthDate',
      'sex',
    ]);
  });

  it('keeps text that looks like a formula', async () => {
    expect((await register(technician, { familyName: '=1+1' })).familyName).toBe('=1+1');
  });

  it('answers a repeated request with the same patient', async () => {
    const send = () =>
      technician.post(paths.patients(), aPatient()).set('Idempotency-Key', 'one-and-the-same');
    const [first, second] = [await send(), await send()];

    expect(second.status).toBe(201);
    expect(second.body.id).toBe(first.body.id);
    expect(await audits('patient.create')).toHaveLength(1);
  });
});

describe('correcting', () => {
  it('changes the patient, counts the version up, and keeps before and after', async () => {
    const { id } = await register(technician);
    const reply = await technician.put(paths.patient(id), aPatient({ familyName: 'Corrected' }), 0);

    expect([reply.status, reply.headers.etag, reply.body.familyName]).toEqual([200, '"1"', 'Corrected']);
    expect(await audits('patient.correct')).toMatchObject([
      {
        patientId: id,
        version: 1,
        detail: { before: { familyName: 'Invented' }, after: { familyName: 'Corrected' } },
      },
    ]);
    expect(await find('corrected')).toEqual(['R-100']);
  });

  it('changes nothing when nothing changed', async () => {
    const { id } = await register(technician);
    const reply = await technician.put(paths.patient(id), aPatient(), 0);

    expect([reply.status, reply.headers.etag]).toEqual([200, '"0"']);
    expect(await audits('patient.correct')).toEqual([]);
  });

  it('rejects a change when the record was changed meanwhile, with what is stored now', async () => {
    const { id } = await register(technician);
    await technician.put(paths.patient(id), aPatient({ familyName: 'Corrected' }), 0);
    const reply = await technician.put(paths.patient(id), aPatient({ familyName: 'Late' }), 0);

    expect(reply.status).toBe(412);
    expect(reply.body.current).toMatchObject({ id, familyName: 'Corrected', version: 1 });
  });

  it('asks which version is changed, and refuses a taken record number', async () => {
    const { id } = await register(technician);
    await register(technician, { recordNumber: 'R-200' });

    expect((await technician.put(paths.patient(id), aPatient())).status).toBe(428);
    expect((await technician.put(paths.patient(id), aPatient({ recordNumber: 'R-200' }), 0)).status).toBe(
      409,
    );
  });
});

describe('viewing', () => {
  it('leaves an audit entry each time', async () => {
    const { id } = await register(technician);
    const reply = await surgeon.get(paths.patient(id));

    expect([reply.status, reply.headers.etag]).toEqual([200, '"0"']);
    expect(await audits('patient.view')).toMatchObject([{ actorId: surgeon.id, patientId: id, version: 0 }]);
  });

  it('is for those who may', async () => {
    const { id } = await register(technician);
    const administrator = await test.signInAs('administrator');

    expect((await request(test.app).get(paths.patient(id))).status).toBe(401);
    expect((await administrator.get(paths.patient(id))).status).toBe(403);
    expect((await surgeon.post(paths.patients(), aPatient())).status).toBe(403);
    expect((await surgeon.put(paths.patient(id), aPatient(), 0)).status).toBe(403);
    expect((await surgeon.get(paths.patient(UNKNOWN))).status).toBe(404);
    expect((await technician.put(paths.patient(UNKNOWN), aPatient(), 0)).status).toBe(404);
    expect((await surgeon.get(paths.patient('nonsense'))).status).toBe(404);
  });
});

describe('the list', () => {
  beforeEach(async () => {
    await register(technician, { recordNumber: 'A-1', familyName: 'Åström', givenName: 'José María' });
    await register(technician, {
      recordNumber: 'B_2',
      familyName: 'Straße',
      givenName: 'Ida',
      birthDate: '1961-12-05',
    });
    await register(technician, { recordNumber: 'C%3', familyName: 'Łukasz', givenName: 'Oda' });
  });

  it('is ordered by folded name', async () => {
    expect(await find('')).toEqual(['A-1', 'C%3', 'B_2']);
  });

  it.each([
    ['astrom', ['A-1']],
    ['JOSE ASTR', ['A-1']],
    ['maría åström', ['A-1']],
    ['strasse', ['B_2']],
    ['lukasz', ['C%3']],
    ['b_2', ['B_2']],
    ['%', ['C%3']],
    ['_', ['B_2']],
    ['1961-12-05', ['B_2']],
    ['5.12.1961', ['B_2']],
    ['05.12.1961 ida', ['B_2']],
    ['05.12.1961 oda', []],
    ['1950-04-03', ['A-1', 'C%3']],
    ['31.02.1961', []],
    ['nobody', []],
  ])('finds %s', async (search, expected) => {
    expect(await find(search)).toEqual(expected);
  });

  it('goes on page by page, without repeating or losing anybody', async () => {
    for (let number = 0; number < 7; number += 1) {
      await register(technician, { recordNumber: `D-${number}`, familyName: 'Same', givenName: 'Name' });
    }
    const seen: string[] = [];
    let after = '';
    do {
      const { body } = await surgeon.get(`${paths.patients()}?limit=3${after && `&after=${after}`}`);
      seen.push(...body.items.map(({ recordNumber }: PatientListItem) => recordNumber));
      expect(body.total).toBe(10);
      after = body.next ?? '';
    } while (after !== '');

    expect(seen).toEqual(['A-1', 'C%3', 'D-0', 'D-1', 'D-2', 'D-3', 'D-4', 'D-5', 'D-6', 'B_2']);
  });

  it('refuses what is no mark of a page and too large a page', async () => {
    expect((await surgeon.get(`${paths.patients()}?after=nonsense`)).status).toBe(422);
    expect((await surgeon.get(`${paths.patients()}?limit=201`)).status).toBe(422);
    expect((await surgeon.get(`${paths.patients()}?search=${'x'.repeat(101)}`)).status).toBe(422);
  });

  it('is for those who may', async () => {
    const administrator = await test.signInAs('administrator');

    expect((await request(test.app).get(paths.patients())).status).toBe(401);
    expect((await administrator.get(paths.patients())).status).toBe(403);
  });
});
