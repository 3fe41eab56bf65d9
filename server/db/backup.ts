/**
 * A copy of the running database. `VACUUM INTO` writes one consistent file; copying a live database file
 * beside its write-ahead log would not.
 */
import { mkdir, readdir, rm } from 'node:fs/promises';
import { join } from 'node:path';
import sqlite3 from 'sqlite3';

export interface BackupRequest {
  databasePath: string;
  folder: string;
  at: Date;
  /** How many copies stay; the oldest go. */
  keep: number;
}

const BACKUP_NAME = /^landfall-\d{4}-\d{2}-\d{2}T\d{2}-\d{2}-\d{2}-\d{3}Z\.sqlite$/;

/** Writes and checks a copy, and returns its path. Throws (and removes the copy) when it is not sound. */
export async function backUp({ databasePath, folder, at, keep }: BackupRequest): Promise<string> {
  await mkdir(folder, { recursive: true, mode: 0o700 });
  const path = join(folder, `landfall-${at.toISOString().replace(/[:.]/g, '-')}.sqlite`);
  await query(databasePath, 'VACUUM INTO ?', [path]);
  const verdict = await query(path, 'PRAGMA integrity_check', []);
  if (verdict[0]?.integrity_check !== 'ok') {
    await rm(path);
    throw new Error('The copy of the database is damaged and was removed');
  }
  await removeOldest(folder, keep);
  return path;
}

async function removeOldest(folder: string, keep: number): Promise<void> {
  const copies = (await readdir(folder)).filter((name) => BACKUP_NAME.test(name)).sort();
  for (const name of copies.slice(0, Math.max(0, copies.length - keep))) await rm(join(folder, name));
}

/** Runs one statement on an existing database file. */
function query(path: string, sql: string, values: string[]): Promise<Record<string, unknown>[]> {
  return new Promise((resolve, reject) => {
    const database = new sqlite3.Database(path, sqlite3.OPEN_READWRITE, (failure) => {
      if (failure) return reject(failure);
      database.all<Record<string, unknown>>(sql, values, (error, rows) => {
        database.close(() => (error ? reject(error) : resolve(rows)));
      });
    });
  });
}
