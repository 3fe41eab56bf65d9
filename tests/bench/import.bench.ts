/**
 * Import of 10,000 rows, checked and stored, beside what cannot be done without: parsing the same text and
 * inserting the same records into a bare table with one prepared statement in one transaction.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { monitorEventLoopDelay } from 'node:perf_hooks';
import Papa from 'papaparse';
import pino from 'pino';
import sqlite3 from 'sqlite3';
import { TEMPLATE_COLUMNS } from '@/shared/contract';
import { inAct, type Actor } from '@/server/act';
import { createBackground } from '@/server/background';
import { systemClock, systemRandom } from '@/server/clock';
import { readConfig } from '@/server/config';
import { createDatabase } from '@/server/db/connection';
import { createMigrator } from '@/server/db/migrate';
import type { Deps } from '@/server/deps';
import { addActiveAccount } from '@/server/features/accounts/account.service';
import { confirmImport, sha256Of, uploadFile } from '@/server/features/imports/import.service';
import { storePractice } from '@/server/features/practice/practice.service';
import { createThrottle } from '@/server/http/throttle';
import { csvOf, manyRows } from '../support/biometry-csv';
import type { BenchRow } from './bench-row';

const ROWS = 10_000;
const RUNS = 5;

export async function benchImport(): Promise<BenchRow[]> {
  const folder = mkdtempSync(join(tmpdir(), 'landfall-bench-'));
  const { deps, actor } = await prepare(folder);
  const runs: Run[] = [];
  for (let run = 0; run < RUNS; run += 1) {
    const text = csvOf(manyRows(ROWS, `B${run}`));
    const [records, parse] = await timed(
      async () => Papa.parse<string[]>(text, { delimiter: ',', newline: '\r\n' }).data,
    );
    const [, insert] = await timed(() =>
      insertBare(join(folder, `bare-${run}.sqlite`), records.slice(1, -1)),
    );
    const pauses = monitorEventLoopDelay({ resolution: 5 });
    pauses.enable();
    const [id, check] = await timed(() => checkOurs(deps, actor, Buffer.from(text)));
    const [, store] = await timed(() => storeOurs(deps, actor, id));
    pauses.disable();
    runs.push({ ours: check + store, bare: parse + insert, check, pause: pauses.max / 1e6 });
  }
  await deps.db.close();
  rmSync(folder, { recursive: true, force: true });
  return report(runs);
}

interface Run {
  ours: number;
  bare: number;
  check: number;
  pause: number;
}

/** The middle run by its ratio: both sides of a ratio were measured one after the other. */
function report(runs: readonly Run[]): BenchRow[] {
  const sorted = [...runs].sort((a, b) => a.ours / a.bare - b.ours / b.bare);
  const middle = sorted[Math.floor(sorted.length / 2)];
  if (!middle) throw new Error('Nothing was measured');
  const { ours, bare, check, pause } = middle;
  return [
    { name: 'import of 10,000 rows, checked and stored', value: ours, unit: 'ms' },
    { name: 'of that, the check', value: check, unit: 'ms' },
    { name: 'papaparse and a bare prepared insert of the same rows', value: bare, unit: 'ms' },
    { name: 'import, ratio to bare parsing and inserting', value: ours / bare, unit: '×', aim: '< 3' },
    { name: 'import, longest pause for other requests', value: pause, unit: 'ms', aim: '< 100' },
  ];
}

async function timed<T>(work: () => Promise<T>): Promise<[T, number]> {
  const start = process.hrtime.bigint();
  const result = await work();
  return [result, Number(process.hrtime.bigint() - start) / 1e6];
}

async function checkOurs(deps: Deps, actor: Actor, bytes: Buffer): Promise<string> {
  const file = { name: 'bench.csv', bytes, sha256: sha256Of(bytes) };
  const { id } = await inAct(deps, { actor, requestId: null }, (act) => uploadFile(deps, act, file));
  await deps.background.idle();
  return id;
}

async function storeOurs(deps: Deps, actor: Actor, id: string): Promise<void> {
  await inAct(deps, { actor, requestId: null }, (act) => confirmImport(deps, act, id));
  await deps.background.idle();
}

function insertBare(path: string, records: readonly string[][]): Promise<void> {
  const columns = TEMPLATE_COLUMNS.join(', ');
  const marks = TEMPLATE_COLUMNS.map(() => '?').join(', ');
  return new Promise((resolve, reject) => {
    const database = new sqlite3.Database(path);
    database.serialize(() => {
      database.exec(`PRAGMA journal_mode = WAL; CREATE TABLE bare (${columns}); BEGIN IMMEDIATE`);
      const statement = database.prepare(`INSERT INTO bare VALUES (${marks})`);
      for (const record of records) statement.run(record);
      statement.finalize();
      database.exec('COMMIT');
      database.close((error) => (error ? reject(error) : resolve()));
    });
  });
}

async function prepare(folder: string): Promise<{ deps: Deps; actor: Actor }> {
  const config = readConfig({ LANDFALL_DATA: folder, LANDFALL_DEMO: '0' });
  const logger = pino({ level: 'silent' });
  const deps: Deps = {
    config,
    logger,
    clock: systemClock,
    random: systemRandom,
    db: createDatabase({ storagePath: config.databasePath }),
    mailer: { send: async () => undefined, close: async () => undefined },
    background: createBackground(logger),
    throttle: createThrottle(systemClock),
    tokenSecret: 'bench',
  };
  await createMigrator(deps.db.sequelize).up();
  const account = await inAct(deps, { actor: null, requestId: null }, async (act) => {
    await storePractice(act, { name: 'Bench practice', isDemo: false });
    const person = { email: 'bench@practice.example', displayName: 'Bench', roles: ['technician' as const] };
    return addActiveAccount(act, { ...person, passwordHash: 'none' });
  });
  return { deps, actor: { ...account, sessionFamilyId: 'bench' } };
}
