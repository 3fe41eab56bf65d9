import { createHash } from 'node:crypto';
import { AuditEntryModel } from '@/server/db/models/audit-entry';
import { FlagSettlementModel } from '@/server/db/models/flag-settlement';
import { LensModel } from '@/server/db/models/lens';
import { MeasurementModel } from '@/server/db/models/measurement';
import { PatientModel } from '@/server/db/models/patient';
import { PlanModel } from '@/server/db/models/plan';
import { DEMO_ACCOUNTS } from '@/server/db/seeds/demo-accounts';
import { demoBiometryCsv } from '@/server/db/seeds/demo-biometry';
import { demoCohort } from '@/server/db/seeds/demo-cohort';
import { NOT_MEASURED_YET } from '@/server/db/seeds/demo-unmeasured';
import { DEMO_PRACTICE_NAME, seedDemo } from '@/server/db/seeds/seed-demo';
import { findAccountByEmail } from '@/server/features/accounts/account.repository';
import { getPractice } from '@/server/features/practice/practice.service';
import {
  paths,
  planDeskSchema,
  planSnapshotSchema,
  type BiometryImport,
  type EyeDesk,
  type EyeStage,
  type ImportRow,
  type Page,
  type PatientListItem,
  type PlanListItem,
  type Side,
} from '@/shared/contract';
import { HOUR } from '@/tests/support/fake-clock';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';
import { confirm, rowsOf, upload } from '../imports/import-support';

let test: TestApp;
let surgeon: SignedIn;
let technician: SignedIn;
let seedMs: number;

beforeAll(async () => {
  test = await startTestApp();
  const startedMs = performance.now();
  await seedDemo(test.deps);
  seedMs = performance.now() - startedMs;
  surgeon = await test.signInAs('surgeon');
  technician = await test.signInAs('technician');
}, 60_000);
afterAll(() => test.close());

const patientsOf = async (search = ''): Promise<PatientListItem[]> => {
  const reply = await technician.get(`${paths.patients()}?limit=200&search=${encodeURIComponent(search)}`);
  expect(reply.status).toBe(200);
  return (reply.body as Page<PatientListItem>).items;
};
const deskOf = async (record: string, side: Side): Promise<EyeDesk> => {
  const [patient] = await patientsOf(record);
  const reply = await surgeon.get(paths.eye(patient?.id ?? '', side));
  expect(reply.status).toBe(200);
  return reply.body as EyeDesk;
};
const stageOf = async (record: string, side: Side): Promise<EyeStage | undefined> =>
  (await patientsOf(record))[0]?.eyes.find((eye) => eye.side === side)?.stage;
const signedPlans = async (): Promise<PlanListItem[]> => {
  const reply = await surgeon.get(`${paths.plans()}?status=signed&limit=100`);
  expect(reply.status).toBe(200);
  return (reply.body as Page<PlanListItem>).items;
};
/** The case, by what its story says. */
const recordOf = (story: RegExp): string => {
  const found = demoCohort().find((one) => story.test(one.story));
  if (!found) throw new Error(`No case says ${story}`);
  return found.person.record;
};

describe('the database of the demonstration', () => {
  it('is filled within a few seconds, and marked as invented throughout', async () => {
    const { name, isDemo, demoDay } = await getPractice();

    expect(seedMs).toBeLessThan(10_000);
    expect({ name, isDemo, demoDay }).toEqual({
      name: DEMO_PRACTICE_NAME,
      isDemo: true,
      demoDay: '2026-03-02',
    });
    expect(DEMO_PRACTICE_NAME).toMatch(/\(demo\)$/);
    expect(await PatientModel.count({ where: { isDemo: false } })).toBe(0);
    expect(await PatientModel.count()).toBe(demoCohort().length + NOT_MEASURED_YET.length);
    expect(await LensModel.count({ where: { isDemo: false } })).toBe(0);
    expect(await LensModel.count()).toBeGreaterThanOrEqual(10);
  });

  it('leads every measurement back to a file of its day, or to the hand of the technician', async () => {
    const files = (await technician.get(`${paths.imports()}?limit=50`)).body as Page<BiometryImport>;
    const typed = await MeasurementModel.findAll({ where: { importId: null } });
    const technicianAccount = await findAccountByEmail(DEMO_ACCOUNTS[0]?.email ?? '');

    expect(files.items.length).toBeGreaterThanOrEqual(6);
    for (const { status, counts, fileName, uploadedAt, uploadedBy } of files.items) {
      expect(status).toBe('stored');
      expect(counts).toMatchObject({ alreadyThere: 0, refused: 0 });
      expect(fileName).toMatch(/^biometry-\d{4}-\d\d-\d\d\.csv$/);
      expect(uploadedAt < test.clock.now().toISOString()).toBe(true);
      expect(uploadedBy).toBe('Tilda Marsh (demo)');
    }
    expect(files.items.reduce((sum, { counts }) => sum + counts.created, 0) + typed.length).toBe(
      await MeasurementModel.count(),
    );
    expect(typed.map(({ createdBy }) => createdBy)).toEqual([technicianAccount?.id]);
  });

  it('tells one story in the audit trail, in order of time, and says that it is invented', async () => {
    const entries = await AuditEntryModel.findAll({ order: ['id'] });
    const moments = entries.map(({ at }) => at);
    const last = entries.at(-1);

    expect([...moments].sort()).toEqual(moments);
    expect(last?.action).toBe('demo.fill');
    expect(last?.detail).toMatchObject({ demoDay: '2026-03-02' });
    const actions = new Set(entries.map(({ action }) => action));
    for (const action of [
      'lens.create',
      'lens.change',
      'import.store',
      'patient.create',
      'eye.change-history',
      'measurement.create',
      'measurement.supersede',
      'flag.settle',
      'plan.create',
      'plan.change',
      'plan.sign',
    ]) {
      expect(actions).toContain(action);
    }
    const people = new Set(entries.slice(0, -1).map(({ actorName }) => actorName));
    expect(people).toEqual(new Set(['Tilda Marsh (demo)', 'Ansel Quay (demo)', 'Ada Brookline (demo)']));
  });

  it('has eyes at every stage of their way', async () => {
    const stages = (await patientsOf()).flatMap(({ eyes }) => eyes.map(({ stage }) => stage));
    const count = (wanted: EyeStage): number => stages.filter((stage) => stage === wanted).length;

    expect(count('measure')).toBeGreaterThanOrEqual(5);
    expect(count('check')).toBeGreaterThanOrEqual(2);
    expect(count('plan')).toBeGreaterThanOrEqual(20);
    expect(count('sign')).toBeGreaterThanOrEqual(5);
    expect(count('signed')).toBeGreaterThanOrEqual(8);
    expect(count('out-of-date')).toBe(1);
  });
});

describe('the signed plans', () => {
  it('are at least eight, each with a lens, a power and a chance', async () => {
    const plans = await signedPlans();

    expect(plans.length).toBeGreaterThanOrEqual(8);
    for (const { lensName, powerD, chance, signedBy, toleranceD } of plans) {
      expect(lensName).not.toBeNull();
      expect(powerD).toBeGreaterThan(5);
      expect(powerD).toBeLessThan(36);
      expect(chance).toBeGreaterThan(0.3);
      expect(toleranceD).toBe(0.5);
      expect(signedBy).toBe('Ansel Quay (demo)');
    }
  });

  it('carry digests of exactly what was signed', async () => {
    const rows = await PlanModel.findAll({ where: { status: 'signed' } });

    expect(rows.length).toBeGreaterThanOrEqual(8);
    for (const { snapshot, digest, signedAt, choice } of rows) {
      expect(
        createHash('sha256')
          .update(snapshot ?? '')
          .digest('hex'),
      ).toBe(digest);
      const frozen = planSnapshotSchema.parse(JSON.parse(snapshot ?? ''));
      expect(frozen.practiceName).toBe(DEMO_PRACTICE_NAME);
      expect(frozen.signedAt).toBe(signedAt);
      expect(frozen.choice).toEqual(choice);
      expect(frozen.chosenCandidate.isClosest).toBe(true);
      expect(frozen.measurement.values.measuredAt <= frozen.signedAt.slice(0, 10)).toBe(true);
    }
  });

  it('stand on what is stored now, but for the one measured again', async () => {
    const outOfDate = (await signedPlans()).filter(({ outOfDateReasons }) => outOfDateReasons.length > 0);

    expect(outOfDate.map(({ recordNumber, outOfDateReasons }) => [recordNumber, outOfDateReasons])).toEqual([
      [recordOf(/out of date/), ['There is a newer measurement of this eye']],
    ]);
    expect(await stageOf(recordOf(/out of date/), 'right')).toBe('out-of-date');
  });

  it('open on the planning desk', async () => {
    const [plan] = await signedPlans();
    const reply = await surgeon.get(paths.plan(plan?.id ?? ''));

    expect(planDeskSchema.parse(reply.body).plan.status).toBe('signed');
  });
});

describe('the named cases', () => {
  it('has a measurement superseded with its reason, and the newer one of record and signed', async () => {
    const { measurements, stage } = await deskOf(recordOf(/superseded/), 'right');
    const [newer, older] = measurements;

    expect(newer).toMatchObject({ isOfRecord: true, provenance: { kind: 'manual' } });
    expect(older).toMatchObject({ isOfRecord: false, supersededById: newer?.id });
    expect(older?.supersededReason).toMatch(/Dry surface/);
    expect(stage).toBe('signed');
  });

  it('has a stop that nobody has settled, and one settled by the surgeon', async () => {
    const open = await deskOf(recordOf(/nobody has asked/), 'left');
    const settled = await deskOf(recordOf(/settled by name/), 'right');
    const [settlement] = await FlagSettlementModel.findAll();

    expect(open.flags.filter(({ severity }) => severity === 'stop').map(({ ruleId }) => ruleId)).toEqual([
      'corneal-surgery-unanswered',
    ]);
    expect(open.stage).toBe('check');
    expect(settled.flags.find(({ severity }) => severity === 'stop')?.settlement).toMatchObject({
      by: 'Ansel Quay (demo)',
      reason: settlement?.reason,
    });
    expect(settled.stage).toBe('signed');
  });

  it.each<[RegExp, Side, string]>([
    [/swollen white cataract, immersion/, 'right', 'swollen-lens'],
    [/swollen white cataract, contact/, 'left', 'contact-ultrasound'],
    [/silicone oil/, 'right', 'silicone-oil'],
    [/after an injury/, 'right', 'swollen-lens'],
    [/myopic|nearsighted/, 'right', 'corneal-surgery'],
    [/thickness unknown/, 'right', 'chamber-depth-reference'],
    [/differ by more than/, 'left', 'between-eyes-axial-length'],
    [/copy/, 'left', 'between-eyes-identical'],
    [/two years/, 'right', 'measured-long-ago'],
    [/steep corneas/, 'right', 'keratometry-outlier'],
    [/^long eyes/, 'right', 'axial-length-outlier'],
  ])('raises for %s (%s) the flag %s', async (story, side, ruleId) => {
    const { flags } = await deskOf(recordOf(story), side);

    expect(flags.map((flag) => flag.ruleId)).toContain(ruleId);
  });

  it('has drafts that can be signed at once, and one in which every formula is silent', async () => {
    const drafts = await PlanModel.findAll({ where: { status: 'draft' } });
    const desks = await Promise.all(
      drafts.map(async ({ id }) => planDeskSchema.parse((await surgeon.get(paths.plan(id))).body)),
    );

    expect(desks.filter(({ blockers }) => blockers.length === 0).length).toBeGreaterThanOrEqual(3);
    const silent = desks.filter(({ calculation }) =>
      calculation.models.every(({ candidates }) => candidates.length === 0),
    );
    expect(silent.map(({ patient }) => patient.recordNumber)).toEqual([recordOf(/nearsightedness/)]);
    const minus = desks.find(({ patient }) => patient.recordNumber === recordOf(/very long eyes/));
    expect(minus?.calculation.models[0]?.candidates.some(({ powerD }) => powerD < 0)).toBe(true);
  });

  it('has second eyes that follow a signed first eye', async () => {
    const patients = await patientsOf();
    const seconds = patients.flatMap(({ eyes }) => {
      const stages = eyes.map(({ stage }) => stage);
      return stages.includes('signed') ? stages.filter((stage) => stage !== 'signed') : [];
    });

    expect(new Set(seconds)).toEqual(new Set(['measure', 'check', 'plan', 'sign']));
  });

  it('keeps the history of the constants that were corrected', async () => {
    const lens = await LensModel.findOne({ where: { name: 'Pilot Mono' } });
    const detail = (await surgeon.get(paths.lens(lens?.id ?? ''))).body as {
      constantHistory: { replacedAt: string | null }[];
    };

    expect(detail.constantHistory.filter(({ replacedAt }) => replacedAt !== null).length).toBe(10);
    expect(detail.constantHistory.filter(({ replacedAt }) => replacedAt === null).length).toBe(10);
  });
});

describe('the file for trying the upload', () => {
  const offered = async (): Promise<Buffer> => {
    const reply = await technician.get(paths.importDemoFile());
    expect(reply.status).toBe(200);
    return Buffer.from(reply.text);
  };

  it('is the same on a later day', async () => {
    const today = await offered();
    test.clock.advance(72 * HOUR);
    technician = await test.signInAs('technician');
    surgeon = await test.signInAs('surgeon');

    expect(await offered()).toEqual(today);
    expect(today).toEqual(demoBiometryCsv('2026-03-02'));
    expect(today.toString().trim().split('\r\n').length - 1).toBe(24);
  });

  it('shows all three outcomes, with reasons that teach', async () => {
    const checked = await upload(test, technician, await offered());
    const rows = await rowsOf(technician, checked.id);

    expect(checked.counts).toEqual({ created: 20, alreadyThere: 1, refused: 3, newPatients: 12 });
    const messages = rows.flatMap(({ problems }) => problems.map(({ message }) => message));
    expect(messages).toHaveLength(3);
    expect(messages[0]).toMatch(/^Axial length must lie between 14 and 40 mm; \d{4} looks like/);
    expect(messages[1]).toMatch(/are the two swapped\?$/);
    expect(messages[2]).toBe('Side "OS" is unknown: write right or left');
    expect(rows.some(({ summary }) => summary === 'known patient, right eye')).toBe(true);
    expect(rows.some((row: ImportRow) => /stored since/.test(row.summary))).toBe(true);
  });

  it('changes nothing when it is stored a second time', async () => {
    const first = await upload(test, technician, await offered());
    await confirm(test, technician, first.id);
    const measurements = await MeasurementModel.count();
    const again = await upload(test, technician, await offered());

    expect(again.counts).toEqual({ created: 0, alreadyThere: 21, refused: 3, newPatients: 0 });
    expect(again.sameFileAs).toBe(first.id);
    await confirm(test, technician, again.id);
    expect(await MeasurementModel.count()).toBe(measurements);
  });
});
