import { readdirSync } from 'node:fs';
import { basename, join } from 'node:path';
import sqlite3 from 'sqlite3';
import { backUp } from '@/server/db/backup';
import { createDatabase, type Database } from '@/server/db/connection';
import { createMigrator } from '@/server/db/migrate';
import { addOneOfEach } from '@/tests/support/rows';
import { temporaryFolder } from '@/tests/support/temporary-folder';

const folder = temporaryFolder();
const databasePath = join(folder.path, 'test.sqlite');
const backups = join(folder.path, 'backups');
let db: Database;

beforeAll(async () => {
  db = createDatabase({ storagePath: databasePath });
  await createMigrator(db.sequelize).up();
  await db.inWrite(addOneOfEach);
});
afterAll(async () => {
  await db.close();
  folder.remove();
});

const read = (path: string, sql: string): Promise<unknown[]> =>
  new Promise((resolve, reject) => {
    const copy = new sqlite3.Database(path, sqlite3.OPEN_READONLY);
    copy.all(sql, (error, rows) => copy.close(() => (error ? reject(error) : resolve(rows))));
  });

describe('backup', () => {
  it('copies the running database, rows that are still in its log included', async () => {
    const path = await backUp({
      databasePath,
      folder: backups,
      at: new Date('2026-03-02T09:00:00Z'),
      keep: 3,
    });

    expect(basename(path)).toBe('landfall-2026-03-02T09-00-00-000Z.sqlite');
    expect(await read(path, 'SELECT record_number FROM patients')).toEqual([{ record_number: 'R-1' }]);
    expect(await read(path, `SELECT count(*) AS n FROM sqlite_master WHERE type = 'trigger'`)).toEqual([
      { n: 8 },
    ]);
  });

  it('keeps the newest copies and leaves other files alone', async () => {
    for (const day of ['03', '04', '05'])
      await backUp({ databasePath, folder: backups, at: new Date(`2026-03-${day}T09:00:00Z`), keep: 3 });

    expect(readdirSync(backups).filter((name) => name.endsWith('.sqlite'))).toEqual([
      'landfall-2026-03-03T09-00-00-000Z.sqlite',
      'landfall-2026-03-04T09-00-00-000Z.sqlite',
      'landfall-2026-03-05T09-00-00-000Z.sqlite',
    ]);
  });

  it('says so when there is no database', async () => {
    const missing = join(folder.path, 'missing.sqlite');

    await expect(backUp({ databasePath: missing, folder: backups, at: new Date(), keep: 3 })).rejects.toThrow(
      /CANTOPEN/,
    );
  });
});
