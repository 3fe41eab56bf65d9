/** One eye: its history, measurements by hand, settlements, and where it stands. */
import request from 'supertest';
import { paths, type EyeDesk, type Flag, type Measurement, type PatientDetail } from '@/shared/contract';
import { AuditEntryModel } from '@/server/db/models/audit-entry';
import { MeasurementModel } from '@/server/db/models/measurement';
import { aLens } from '@/tests/support/lenses';
import { anEntry, answerHistory, PLAIN_HISTORY, register } from '@/tests/support/patients';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let technician: SignedIn;
let surgeon: SignedIn;
let patient: PatientDetail;
const UNKNOWN = '3f0c5f2e-8f0e-4a53-9f5e-2b3f4f6f7a11';

beforeEach(async () => {
  test = await startTestApp();
  technician = await test.signInAs('technician');
  surgeon = await test.signInAs('surgeon');
  patient = await register(technician);
});
afterEach(() => test.close());

const audits = (action: string) => AuditEntryModel.findAll({ where: { action } });
const desk = async (side: 'right' | 'left' = 'right'): Promise<EyeDesk> => {
  const reply = await surgeon.get(paths.eye(patient.id, side));
  expect(reply.status).toBe(200);
  return reply.body as EyeDesk;
};
const enter = async (change = {}, more = {}): Promise<Measurement> => {
  const reply = await technician.post(paths.eyeMeasurements(patient.id, 'right'), {
    ...anEntry(change),
    ...more,
  });
  expect(reply.body.errors).toBeUndefined();
  expect(reply.status).toBe(201);
  return reply.body as Measurement;
};

describe('the desk', () => {
  it('shows the eye, its fellow and what it waits for, and is audited', async () => {
    const seen = await desk('left');

    expect(seen).toMatchObject({
      patient: { id: patient.id, recordNumber: 'R-100' },
      eye: { side: 'left', version: 0, history: { cornealSurgery: null, lensStatus: null, remarks: '' } },
      fellowEye: { side: 'right' },
      measurements: [],
      fellowMeasurement: null,
      plans: [],
      stage: 'measure',
      waitsFor: 'Waits for a measurement',
    });
    expect(await audits('eye.view')).toMatchObject([
      { actorId: surgeon.id, patientId: patient.id, detail: { side: 'left' } },
    ]);
  });

  it('is for those who may', async () => {
    const administrator = await test.signInAs('administrator');

    expect((await request(test.app).get(paths.eye(patient.id, 'right'))).status).toBe(401);
    expect((await administrator.get(paths.eye(patient.id, 'right'))).status).toBe(403);
    expect((await surgeon.get(paths.eye(UNKNOWN, 'right'))).status).toBe(404);
    expect((await surgeon.get(`/api/patients/${patient.id}/eyes/both`)).status).toBe(404);
  });
});

describe('the history', () => {
  const path = () => paths.eyeHistory(patient.id, 'right');

  it('is recorded with its version, and keeps before and after', async () => {
    const reply = await technician.put(path(), PLAIN_HISTORY, 0);

    expect([reply.status, reply.headers.etag]).toEqual([200, '"1"']);
    expect(reply.body.history).toEqual(PLAIN_HISTORY);
    expect(await audits('eye.change-history')).toMatchObject([
      {
        patientId: patient.id,
        version: 1,
        detail: { side: 'right', before: { cornealSurgery: null }, after: { cornealSurgery: 'no' } },
      },
    ]);
    expect((await desk('left')).eye.history.cornealSurgery).toBeNull();
  });

  it('is not overwritten by somebody who saw an older one', async () => {
    await technician.put(path(), PLAIN_HISTORY, 0);
    const reply = await technician.put(path(), { ...PLAIN_HISTORY, lensStatus: 'aphakic' }, 0);

    expect(reply.status).toBe(412);
    expect(reply.body.current).toMatchObject({
      side: 'right',
      version: 1,
      history: { lensStatus: 'phakic' },
    });
  });

  it('is checked', async () => {
    const kindWithoutSurgery = { ...PLAIN_HISTORY, cornealSurgeryKind: 'myopic-laser' };
    const reply = await technician.put(path(), kindWithoutSurgery, 0);

    expect(reply.status).toBe(422);
    expect(reply.body.errors[0].path).toBe('cornealSurgeryKind');
    expect((await technician.put(path(), PLAIN_HISTORY)).status).toBe(428);
    expect((await surgeon.put(path(), PLAIN_HISTORY, 0)).status).toBe(403);
    expect((await technician.put(paths.eyeHistory(UNKNOWN, 'left'), PLAIN_HISTORY, 0)).status).toBe(404);
  });
});

describe('a measurement by hand', () => {
  it('is stored with who entered it, and becomes the one of record', async () => {
    const measurement = await enter();

    expect(measurement).toMatchObject({
      patientId: patient.id,
      side: 'right',
      isOfRecord: true,
      createdBy: technician.displayName,
      provenance: { kind: 'manual', enteredBy: technician.displayName },
      values: { axialLengthMm: 23.51, flatRadiusMm: 7.803468208, flatAxisDeg: 175 },
      supersededById: null,
    });
    expect(await audits('measurement.create')).toMatchObject([
      { actorId: technician.id, nounId: measurement.id, patientId: patient.id, detail: { side: 'right' } },
    ]);
    const seen = await surgeon.get(paths.measurement(measurement.id));
    expect(seen.body).toEqual(measurement);
    expect(await audits('measurement.view')).toHaveLength(1);
  });

  it('names each field that is wrong, knowing the birth date', async () => {
    const reply = await technician.post(
      paths.eyeMeasurements(patient.id, 'right'),
      anEntry({ axialLengthMm: '2350', measuredAt: '1950-04-02' }),
    );

    expect(reply.status).toBe(422);
    expect(reply.body.errors).toEqual([
      { path: 'text.measuredAt', code: 'custom', message: '1950-04-02 lies before the birth on 1950-04-03' },
      {
        path: 'text.axialLengthMm',
        code: 'custom',
        message:
          'Axial length must lie between 14 and 40 mm; 2350 looks like 23.50 mm without its decimal mark',
      },
    ]);
    expect(await MeasurementModel.count()).toBe(0);
  });

  it('is refused when the same is there already', async () => {
    await enter();
    const reply = await technician.post(paths.eyeMeasurements(patient.id, 'right'), anEntry());

    expect(reply.status).toBe(409);
    expect(reply.body.detail).toBe('The same measurement of this eye is stored since 2026-03-02');
    expect((await technician.post(paths.eyeMeasurements(patient.id, 'left'), anEntry())).status).toBe(201);
  });

  it('takes the place of another with a reason, and the other stays as it was', async () => {
    const first = await enter();
    const second = await enter(
      { axialLengthMm: '23.61' },
      { supersedesId: first.id, reason: 'Wrong patient on the device' },
    );
    const seen = await desk();

    expect(seen.measurements.map(({ id, isOfRecord }) => [id, isOfRecord])).toEqual(
      expect.arrayContaining([
        [second.id, true],
        [first.id, false],
      ]),
    );
    expect(seen.measurements.find(({ id }) => id === first.id)).toMatchObject({
      values: { axialLengthMm: 23.51 },
      supersededById: second.id,
      supersededReason: 'Wrong patient on the device',
    });
    expect(await audits('measurement.supersede')).toMatchObject([
      { nounId: first.id, detail: { supersededById: second.id, reason: 'Wrong patient on the device' } },
    ]);
  });

  it('supersedes once, of the same eye, and not without a reason', async () => {
    const first = await enter();
    const path = paths.eyeMeasurements(patient.id, 'right');
    const replace = (change: object, more: object) =>
      technician.post(path, {
        ...anEntry({ axialLengthMm: '23.7', ...change }),
        supersedesId: first.id,
        ...more,
      });

    expect((await replace({}, { reason: '' })).body.errors[0].path).toBe('reason');
    const left = paths.eyeMeasurements(patient.id, 'left');
    const otherEye = await technician.post(left, {
      ...anEntry(),
      supersedesId: first.id,
      reason: 'other side',
    });
    expect([otherEye.status, otherEye.body.errors[0].path]).toEqual([422, 'supersedesId']);
    expect((await replace({}, { reason: 'measured again' })).status).toBe(201);
    expect((await replace({ axialLengthMm: '23.8' }, { reason: 'measured again' })).status).toBe(409);
    expect(await MeasurementModel.count()).toBe(2);
  });

  it('is of record by its day, not by when it was entered', async () => {
    const newer = await enter();
    await enter({ measuredAt: '2025-01-10' });

    expect(
      (await desk()).measurements.map(({ values, isOfRecord }) => [values.measuredAt, isOfRecord]),
    ).toEqual([
      ['2026-02-20', true],
      ['2025-01-10', false],
    ]);
    expect((await desk()).measurements[0]?.id).toBe(newer.id);
  });

  it('is for those who may', async () => {
    const path = paths.eyeMeasurements(patient.id, 'right');
    const { id } = await enter();
    const administrator = await test.signInAs('administrator');

    expect((await request(test.app).post(path).send(anEntry())).status).toBe(401);
    expect((await surgeon.post(path, anEntry())).status).toBe(403);
    expect((await technician.post(paths.eyeMeasurements(UNKNOWN, 'right'), anEntry())).status).toBe(404);
    expect((await request(test.app).get(paths.measurement(id))).status).toBe(401);
    expect((await administrator.get(paths.measurement(id))).status).toBe(403);
    expect((await surgeon.get(paths.measurement(UNKNOWN))).status).toBe(404);
  });
});

describe('stops', () => {
  const path = () => paths.eyeSettlements(patient.id, 'right');
  const openStops = (flags: Flag[]) =>
    flags.filter(({ severity, settlement }) => severity === 'stop' && !settlement);

  it('hold the eye up until they are settled by name and reason', async () => {
    const { id: measurementId } = await enter();
    const before = await desk();
    expect(before.stage).toBe('check');
    expect(before.waitsFor).toBe(openStops(before.flags)[0]?.message);

    for (const { ruleId } of openStops(before.flags)) {
      const reply = await surgeon.post(path(), { ruleId, measurementId, reason: 'asked by telephone' });
      expect([reply.status, reply.body.settlement]).toEqual([
        201,
        { by: surgeon.displayName, at: '2026-03-02T09:00:00.000Z', reason: 'asked by telephone' },
      ]);
    }

    expect(await desk()).toMatchObject({ stage: 'plan', waitsFor: 'Waits for a plan' });
    expect((await audits('flag.settle'))[0]).toMatchObject({
      actorId: surgeon.id,
      patientId: patient.id,
      detail: { side: 'right', severity: 'stop', measurementId, reason: 'asked by telephone' },
    });
  });

  it('go away when what is missing is answered', async () => {
    await enter();
    await answerHistory(technician, patient.id, 'right');

    expect((await desk()).stage).toBe('plan');
  });

  it('are settled for one measurement and no other', async () => {
    const first = await enter();
    const [stop] = openStops((await desk()).flags);
    await surgeon.post(path(), {
      ruleId: stop?.ruleId,
      measurementId: first.id,
      reason: 'asked by telephone',
    });
    await enter({ axialLengthMm: '23.6', measuredAt: '2026-02-25' });

    expect((await desk()).stage).toBe('check');
  });

  it('are not settled any more when the history is changed after', async () => {
    const { id: measurementId } = await enter();
    await technician.put(
      paths.eyeHistory(patient.id, 'right'),
      { ...PLAIN_HISTORY, cornealSurgery: 'unknown' },
      0,
    );
    const [stop] = openStops((await desk()).flags);
    expect(stop?.message).toBe('It is not known whether this cornea had surgery');
    await surgeon.post(path(), { ruleId: stop?.ruleId, measurementId, reason: 'topography is regular' });
    expect((await desk()).stage).toBe('plan');

    test.clock.advance(1000);
    await technician.put(
      paths.eyeHistory(patient.id, 'right'),
      { ...PLAIN_HISTORY, cornealSurgery: null },
      1,
    );

    expect((await desk()).stage).toBe('check');
    expect(openStops((await desk()).flags).map(({ message }) => message)).toEqual([
      'Nobody has answered whether this cornea had surgery',
    ]);
  });

  it('are settled once, while they stand, for the measurement of record', async () => {
    const { id: measurementId } = await enter();
    const [stop] = openStops((await desk()).flags);
    const settle = (change: object) =>
      surgeon.post(path(), { ruleId: stop?.ruleId, measurementId, reason: 'asked by telephone', ...change });

    expect((await settle({ ruleId: 'no-such-rule' })).status).toBe(409);
    expect((await settle({ measurementId: null })).status).toBe(409);
    expect((await settle({ reason: 'no' })).status).toBe(422);
    expect((await settle({})).status).toBe(201);
    const again = await settle({});
    expect([again.status, again.body.detail]).toEqual([409, `Settled already by ${surgeon.displayName}`]);
  });

  it('are settled by those who may', async () => {
    const counsellor = await test.signInAs('counsellor');
    const body = { ruleId: 'x', measurementId: null, reason: 'a good reason' };

    expect((await request(test.app).post(path()).send(body)).status).toBe(401);
    expect((await counsellor.post(path(), body)).status).toBe(403);
    expect((await surgeon.post(paths.eyeSettlements(UNKNOWN, 'right'), body)).status).toBe(404);
  });

  it('are counted in the list of patients', async () => {
    await enter();
    const { body } = await surgeon.get(paths.patients());

    expect(
      body.items[0].eyes.map(({ side, stage }: { side: string; stage: string }) => [side, stage]),
    ).toEqual([
      ['right', 'check'],
      ['left', 'measure'],
    ]);
  });
});

describe('the way of the eye', () => {
  it('goes on with a draft to waiting for a signature', async () => {
    const administrator = await test.signInAs('administrator');
    await administrator.post(paths.lenses(), aLens());
    await enter();
    await answerHistory(technician, patient.id, 'right');

    const draft = await surgeon.post(paths.eyePlans(patient.id, 'right'), {});

    expect(draft.status).toBe(201);
    const seen = await desk();
    expect(seen).toMatchObject({ stage: 'sign', waitsFor: 'Draft waits for a signature' });
    expect(seen.plans.map(({ status, sequence }) => [status, sequence])).toEqual([['draft', 1]]);
    const { body } = await technician.get(paths.patient(patient.id));
    expect(body.eyes[0]).toEqual({ side: 'right', stage: 'sign', waitsFor: 'Draft waits for a signature' });
  });
});
