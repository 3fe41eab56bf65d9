import { join } from 'node:path';
import { QueryTypes } from 'sequelize';
import { createDatabase, type Database } from '@/server/db/connection';
import { createMigrator } from '@/server/db/migrate';
import { MeasurementModel } from '@/server/db/models/measurement';
import { PlanModel } from '@/server/db/models/plan';
import { addDraft, addOneOfEach, SIGNATURE } from '@/tests/support/rows';
import { temporaryFolder } from '@/tests/support/temporary-folder';

const folder = temporaryFolder();
let db: Database;

beforeAll(() => {
  db = createDatabase({ storagePath: join(folder.path, 'test.sqlite') });
});
afterAll(async () => {
  await db.close();
  folder.remove();
});

const objects = () =>
  db.sequelize.query<{ type: string; name: string; sql: string }>(
    `SELECT type, name, sql FROM sqlite_master
      WHERE name NOT LIKE 'sqlite_%' AND name <> 'schema_migrations' ORDER BY type, name`,
    { type: QueryTypes.SELECT },
  );

describe('migrations', () => {
  it('go up, down with rows in every child table, and up again to the same schema', async () => {
    const migrator = createMigrator(db.sequelize);

    expect(await migrator.hasPending()).toBe(true);
    await migrator.up();
    const first = await objects();
    await db.inWrite(addOneOfEach);
    await migrator.down();
    const between = await objects();
    await migrator.up();

    expect(first.filter(({ type }) => type === 'table').map(({ name }) => name)).toEqual([
      'accounts',
      'audit_entries',
      'eyes',
      'flag_settlements',
      'idempotency_keys',
      'imports',
      'lens_constants',
      'lenses',
      'mails',
      'measurements',
      'password_links',
      'patients',
      'plans',
      'refresh_sessions',
      'settings',
    ]);
    expect(between).toEqual([]);
    expect(await objects()).toEqual(first);
    expect(await migrator.hasPending()).toBe(false);
  });

  it('give every model the columns of its table, and every table a model', async () => {
    const tables = (await objects()).filter(({ type }) => type === 'table').map(({ name }) => name);
    const models = Object.values(db.sequelize.models).filter(
      ({ tableName }) => tableName !== 'schema_migrations',
    );

    expect(models.map(({ tableName }) => tableName).sort()).toEqual(tables);
    for (const model of models) {
      const columns = Object.keys(await db.sequelize.getQueryInterface().describeTable(model.tableName));
      const attributes = Object.values(model.getAttributes()).map(({ field }) => field);
      expect(attributes.sort()).toEqual(columns.sort());
    }
  });
});

describe('triggers', () => {
  beforeAll(() => db.inWrite(addOneOfEach));

  const run = (sql: string) => db.inWrite((transaction) => db.sequelize.query(sql, { transaction }));
  /** Sequelize says "Validation error" for every refusal; the driver's error below it says which. */
  const refusalOf = (work: Promise<unknown>): Promise<string> =>
    work.then(
      () => 'not refused',
      (error: { parent?: Error }) => error.parent?.message ?? 'no driver error',
    );

  it.each([
    [`UPDATE audit_entries SET actor_name = 'somebody else'`, /audit trail is never changed/],
    [`DELETE FROM audit_entries`, /audit trail is never deleted/],
    [`UPDATE flag_settlements SET reason = 'other'`, /settlement is never changed/],
    [`DELETE FROM flag_settlements`, /settlement is never deleted/],
    [`UPDATE measurements SET axial_length_mm = 24`, /superseded, never changed/],
    [`UPDATE measurements SET remarks = 'x' WHERE id = 'measurement-1'`, /superseded, never changed/],
    [`UPDATE measurements SET superseded_by_id = 'measurement-2'`, /superseded, never changed/],
    [`DELETE FROM measurements`, /measurement is never deleted/],
  ])('refuse %s', async (sql, message) => {
    expect(await refusalOf(run(sql))).toMatch(message);
  });

  it('let a measurement be superseded once, with a reason', async () => {
    const supersede = (by: string) =>
      db.inWrite((transaction) =>
        MeasurementModel.update(
          { supersededById: by, supersededReason: 'wrong patient' },
          { where: { id: 'measurement-1' }, transaction },
        ),
      );

    await supersede('measurement-2');

    expect((await MeasurementModel.findByPk('measurement-1'))?.supersededById).toBe('measurement-2');
    expect(await refusalOf(supersede('measurement-1'))).toMatch(/superseded, never changed/);
    expect(await refusalOf(run(`UPDATE measurements SET superseded_by_id = NULL`))).toMatch(/never changed/);
  });

  it('refuse a signature without choice, name or digest', async () => {
    expect(await refusalOf(run(`UPDATE plans SET status = 'signed' WHERE id = 'plan-1'`))).toMatch(/CHECK/);
  });

  it('freeze a plan once it is signed, but for being replaced', async () => {
    await db.inWrite(async (transaction) => {
      const plan = await PlanModel.findByPk('plan-1', { transaction, rejectOnEmpty: true });
      await plan.update({ status: 'signed', ...SIGNATURE }, { transaction });
      await addDraft({ id: 'plan-2', sequence: 2 }, transaction);
    });

    for (const change of [
      `snapshot = '{}'`,
      `digest = 'x'`,
      `signed_by = NULL`,
      `signed_at = 'x'`,
      `input = '{}'`,
      `choice = '{}'`,
      `status = 'draft'`,
      `status = 'discarded'`,
      `eye_id = 'x'`,
    ])
      expect(await refusalOf(run(`UPDATE plans SET ${change} WHERE id = 'plan-1'`))).toMatch(
        /never changed|CHECK/,
      );
    expect(await refusalOf(run(`DELETE FROM plans WHERE id = 'plan-1'`))).toMatch(/never deleted/);

    await run(`UPDATE plans SET status = 'replaced', replaced_by_id = 'plan-2' WHERE id = 'plan-1'`);
    expect(await refusalOf(run(`UPDATE plans SET status = 'signed' WHERE id = 'plan-1'`))).toMatch(
      /never changed/,
    );
    expect(await refusalOf(run(`UPDATE plans SET replaced_by_id = NULL WHERE id = 'plan-1'`))).toMatch(
      /never changed/,
    );
    await run(`DELETE FROM plans WHERE id = 'plan-2' AND 1 = 0`);
  });

  it('let one eye have one signed plan at a time', async () => {
    const sign = (id: string) =>
      db.inWrite(async (transaction) => {
        const plan = await PlanModel.findByPk(id, { transaction, rejectOnEmpty: true });
        await plan.update({ status: 'signed', ...SIGNATURE }, { transaction });
      });
    await db.inWrite((transaction) => addDraft({ id: 'plan-3', sequence: 3 }, transaction));

    await sign('plan-2');

    expect(await refusalOf(sign('plan-3'))).toMatch(/UNIQUE/);
  });
});
