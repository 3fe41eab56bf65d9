import { join } from 'node:path';
import { QueryTypes } from 'sequelize';
import { createDatabase, type Database } from '@/server/db/connection';
import { createMigrator } from '@/server/db/migrate';
import { PlanModel } from '@/server/db/models/plan';
import { SettingModel } from '@/server/db/models/setting';
import { MeasurementModel } from '@/server/db/models/measurement';
import { addOneOfEach } from '@/tests/support/rows';
import { temporaryFolder } from '@/tests/support/temporary-folder';

const folder = temporaryFolder();
let db: Database;

beforeAll(async () => {
  db = createDatabase({ storagePath: join(folder.path, 'test.sqlite') });
  await createMigrator(db.sequelize).up();
});
afterAll(async () => {
  await db.close();
  folder.remove();
});

describe('connection', () => {
  it.each([
    ['journal_mode', 'journal_mode', 'wal'],
    ['synchronous', 'synchronous', 1],
    ['busy_timeout', 'timeout', 5000],
    ['foreign_keys', 'foreign_keys', 1],
  ])('sets %s inside a transaction, which has a connection of its own', async (pragma, column, expected) => {
    const rows = await db.inWrite((transaction) =>
      db.sequelize.query<Record<string, unknown>>(`PRAGMA ${pragma}`, {
        type: QueryTypes.SELECT,
        transaction,
      }),
    );

    expect(rows[0]?.[column]).toBe(expected);
  });

  it('refuses a row whose parent does not exist', async () => {
    const sql = `INSERT INTO eyes (id, patient_id, side, created_at, updated_at) VALUES ('e', 'nobody', 'left', '', '')`;

    await expect(db.inWrite((transaction) => db.sequelize.query(sql, { transaction }))).rejects.toThrow(
      /FOREIGN KEY/,
    );
  });
});

describe('write queue', () => {
  it('takes 20 writes at once, loses none and refuses none', async () => {
    const increment = () =>
      db.inWrite(async (transaction) => {
        const row = await SettingModel.findByPk('counter', { transaction });
        const value = Number(row?.value ?? 0) + 1;
        await SettingModel.upsert({ key: 'counter', value }, { transaction });
        return value;
      });

    const results = await Promise.all(Array.from({ length: 20 }, increment));

    expect(results).toEqual(Array.from({ length: 20 }, (_, index) => index + 1));
    expect((await SettingModel.findByPk('counter'))?.value).toBe(20);
  });

  it('rolls a failing write back and goes on with the next', async () => {
    const failing = db.inWrite(async (transaction) => {
      await SettingModel.upsert({ key: 'half-done', value: 1 }, { transaction });
      throw new Error('stopped');
    });
    const next = db.inWrite((transaction) => SettingModel.upsert({ key: 'next', value: 2 }, { transaction }));

    await expect(failing).rejects.toThrow('stopped');
    await next;
    await db.idle();

    expect(await SettingModel.findByPk('half-done')).toBeNull();
    expect((await SettingModel.findByPk('next'))?.value).toBe(2);
  });
});

describe('models', () => {
  it('give back numbers, JSON and nulls as they were stored', async () => {
    await db.inWrite(addOneOfEach);

    const measurement = await MeasurementModel.findByPk('measurement-1', { rejectOnEmpty: true });
    const plan = await PlanModel.findByPk('plan-1', { rejectOnEmpty: true });

    expect(measurement.axialLengthMm).toBe(23.52);
    expect(measurement.pupilMm).toBeNull();
    expect(measurement.raw).toBeNull();
    expect(plan.input.formulas).toEqual(['haigis']);
    expect(plan.choice).toBeNull();
    expect(plan.version).toBe(0);
  });

  it('store an absent JSON value as NULL, not as the text "null"', async () => {
    const rows = await db.sequelize.query<{ kind: string }>(
      `SELECT typeof(choice) AS kind FROM plans WHERE id = 'plan-1'`,
      { type: QueryTypes.SELECT },
    );

    expect(rows).toEqual([{ kind: 'null' }]);
  });

  it('count the version up at each change and refuse a change of an older version', async () => {
    const first = await PlanModel.findByPk('plan-1', { rejectOnEmpty: true });
    const second = await PlanModel.findByPk('plan-1', { rejectOnEmpty: true });

    await db.inWrite((transaction) =>
      first.update({ updatedAt: '2026-03-03T00:00:00.000Z' }, { transaction }),
    );
    const late = db.inWrite((transaction) => second.update({ updatedAt: 'later' }, { transaction }));

    await expect(late).rejects.toThrow(/stale/i);
    expect((await PlanModel.findByPk('plan-1'))?.version).toBe(1);
  });
});
