/**
 * The plan of one eye: its candidate table in memory, and reading its desk over HTTP beside a bare Express server that
 * reads the same rows from the same file with sqlite3 and sends them as they are. Ours signs in, checks the role,
 * calculates and writes the audit trail besides.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { Agent, request, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import express from 'express';
import pino from 'pino';
import sqlite3 from 'sqlite3';
import { defaultSpread, formulaIds, prepareFormula, prepareLanding } from '@/formulas';
import { calculatePlan } from '@/shared/clinical/plan-calculation';
import { paths } from '@/shared/contract';
import type { PlanDesk, PlanListItem, Practice, Session } from '@/shared/contract';
import { readConfig } from '@/server/config';
import { startServer } from '@/server/start';
import type { BenchRow } from './bench-row';

/** Both sides take turns, so that neither has the quieter minute. */
const ROUNDS = 5;
const REQUESTS = 200;
const WARM_UP = 300;

export async function benchPlan(): Promise<BenchRow[]> {
  const folder = mkdtempSync(join(tmpdir(), 'landfall-bench-'));
  // As it runs in a practice: replies are not checked against their schema a second time.
  const config = readConfig({ LANDFALL_DATA: folder, PORT: '0', NODE_ENV: 'production' });
  const running = await startServer(config, pino({ level: 'silent' }));
  const { token, desk } = await openDraft(`http://localhost:${running.port}`);
  const bare = await bareServer(config.databasePath, desk);
  const ours = caller(running.port, paths.plan(desk.plan.id), { Authorization: `Bearer ${token}` });
  const theirs = caller(bare.port, '/plan', {});
  const times = await taken(ours, theirs);
  bare.close();
  await running.stop();
  rmSync(folder, { recursive: true, force: true });
  return [...tableRows(desk), ...overHttpRows(times)];
}

function tableRows(desk: PlanDesk): BenchRow[] {
  return [
    {
      name: 'candidate table, 5 formulas × 61 powers',
      value: candidateTableMs(desk),
      unit: 'ms',
      aim: '< 1',
    },
    {
      name: 'landings of the table, 5 formulas × 61 powers',
      value: landingTableMs(desk),
      unit: 'ms',
      aim: '< 3',
    },
    { name: 'whole calculation of the plan, per model', value: calculationMs(desk), unit: 'ms', aim: '< 1' },
  ];
}

interface Times {
  ours: number[];
  theirs: number[];
}

function overHttpRows({ ours, theirs }: Times): BenchRow[] {
  const ratio = (share: number): number => quantile(ours, share) / quantile(theirs, share);
  return [
    { name: 'plan desk over HTTP, p50', value: quantile(ours, 0.5), unit: 'ms' },
    { name: 'bare read of the same rows over HTTP, p50', value: quantile(theirs, 0.5), unit: 'ms' },
    { name: 'plan desk over HTTP, p50 beside the bare read', value: ratio(0.5), unit: '×', aim: '< 3' },
    { name: 'plan desk over HTTP, p95 beside the bare read', value: ratio(0.95), unit: '×', aim: '< 3' },
  ];
}

const POWERS_D = Array.from({ length: 61 }, (_, index) => index * 0.5);

/** Median of many runs of the whole table, the eye prepared anew each time. */
function candidateTableMs(desk: PlanDesk): number {
  return medianMs(() => {
    for (const { formula, eye, constants } of questionsOf(desk)) {
      const prepared = prepareFormula(formula, eye, constants, {});
      for (const powerD of POWERS_D) prepared.refractionAt(powerD);
    }
  });
}

function landingTableMs(desk: PlanDesk): number {
  const spread = defaultSpread('optical');
  return medianMs(() => {
    for (const question of questionsOf(desk)) {
      const prepared = prepareLanding({ ...question, spread });
      for (const powerD of POWERS_D) prepared.at(powerD).chanceWithin(0, 0.5);
    }
  });
}

function calculationMs({ plan, eye, measurement, lenses, calculation }: PlanDesk): number {
  const { input, choice } = plan;
  const models = lenses.filter(({ id }) => input.lensIds.includes(id));
  const { flags } = calculation;
  const question = { eye, measurement, lenses: models, input, flags, choice };
  return medianMs(() => calculatePlan(question)) / models.length;
}

function questionsOf({ calculation }: PlanDesk) {
  const { axialLengthMm, flatRadiusMm, steepRadiusMm, anteriorChamberDepthMm } = calculation.eye;
  const eye = {
    axialLengthMm,
    flatRadiusMm,
    steepRadiusMm,
    anteriorChamberDepthMm: anteriorChamberDepthMm ?? undefined,
  };
  const constants = calculation.models[0]?.constants ?? [];
  return formulaIds.flatMap((formula) => {
    const own = constants.find((constant) => constant.formula === formula);
    return own ? [{ formula, eye, constants: own.values }] : [];
  });
}

function medianMs(run: () => void): number {
  const times: number[] = [];
  for (let index = 0; index < 400; index += 1) {
    const start = performance.now();
    run();
    times.push(performance.now() - start);
  }
  return quantile(times.slice(100), 0.5);
}

/** The surgeon of the demonstration opens a draft in which every formula speaks. */
async function openDraft(origin: string): Promise<{ token: string; desk: PlanDesk }> {
  const headers = { 'Content-Type': 'application/json', 'X-Landfall': '1' };
  const read = async <T>(path: string, init: RequestInit = {}): Promise<T> => {
    const reply = await fetch(origin + path, {
      ...init,
      headers: { ...headers, ...(init.headers as object) },
    });
    return (await reply.json()) as T;
  };
  const { demoAccounts } = await read<Practice>(paths.practice());
  const surgeon = demoAccounts.find(({ roles }) => roles.includes('surgeon'));
  const credentials = JSON.stringify({ email: surgeon?.email, password: surgeon?.password });
  const { accessToken } = await read<Session>(paths.signIn(), { method: 'POST', body: credentials });
  const bearer = { headers: { Authorization: `Bearer ${accessToken}` } };
  const { items } = await read<{ items: PlanListItem[] }>(`${paths.plans()}?status=draft`, bearer);
  for (const { id } of items) {
    const desk = await read<PlanDesk>(paths.plan(id), bearer);
    if (desk.calculation.models[0]?.silenced.length === 0) return { token: accessToken, desk };
  }
  throw new Error('The demonstration has no draft in which every formula speaks');
}

/** Every row that the desk is made of, and the session that is looked up on the way to it. */
const BARE_READS: readonly string[] = [
  'SELECT s.*, a.* FROM refresh_sessions s JOIN accounts a ON a.id = s.account_id WHERE a.id = $surgeon LIMIT 1',
  'SELECT p.*, a.display_name FROM plans p JOIN accounts a ON a.id = p.created_by WHERE p.id = $plan',
  'SELECT * FROM patients WHERE id = $patient',
  'SELECT * FROM eyes WHERE patient_id = $patient',
  `SELECT m.*, a.display_name, i.file_name FROM measurements m JOIN eyes e ON e.id = m.eye_id
     JOIN accounts a ON a.id = m.created_by LEFT JOIN imports i ON i.id = m.import_id WHERE e.patient_id = $patient`,
  'SELECT s.* FROM flag_settlements s JOIN eyes e ON e.id = s.eye_id WHERE e.patient_id = $patient',
  'SELECT * FROM lenses',
  'SELECT * FROM lens_constants WHERE replaced_at IS NULL',
];

async function bareServer(
  databasePath: string,
  { plan, patient }: PlanDesk,
): Promise<{ port: number; close: () => void }> {
  const database = new sqlite3.Database(databasePath);
  const surgeon = await rowsOf(database, 'SELECT id FROM accounts WHERE display_name = $name', {
    $name: plan.createdBy,
  });
  const known: Record<string, unknown> = {
    $surgeon: (surgeon[0] as { id: string }).id,
    $plan: plan.id,
    $patient: patient.id,
  };
  const app = express();
  app.get('/plan', async (_request, response) => {
    const rows = await Promise.all(
      BARE_READS.map((sql) =>
        rowsOf(
          database,
          sql,
          Object.fromEntries(Object.entries(known).filter(([name]) => sql.includes(name))),
        ),
      ),
    );
    response.json(rows);
  });
  const server = await new Promise<Server>((resolve) => {
    const started: Server = app.listen(0, () => resolve(started));
  });
  const { port } = server.address() as AddressInfo;
  return {
    port,
    close: () => {
      server.close();
      database.close();
    },
  };
}

function rowsOf(database: sqlite3.Database, sql: string, bind: Record<string, unknown>): Promise<unknown[]> {
  return new Promise((resolve, reject) => {
    database.all(sql, bind, (error, rows) => (error ? reject(error) : resolve(rows)));
  });
}

type Call = () => Promise<void>;

/** One connection that stays open; the client of Node itself, which adds least. */
function caller(port: number, path: string, headers: Record<string, string>): Call {
  const agent = new Agent({ keepAlive: true, maxSockets: 1 });
  return () =>
    new Promise((resolve, reject) => {
      const call = request({ host: 'localhost', port, path, agent, headers }, (response) => {
        if (response.statusCode !== 200) reject(new Error(`${path} answered ${response.statusCode}`));
        response.resume();
        response.on('end', () => resolve());
      });
      call.on('error', reject);
      call.end();
    });
}

async function taken(ours: Call, theirs: Call): Promise<Times> {
  const times: Times = { ours: [], theirs: [] };
  await timesOf(ours, WARM_UP);
  await timesOf(theirs, WARM_UP);
  for (let round = 0; round < ROUNDS; round += 1) {
    times.ours.push(...(await timesOf(ours, REQUESTS)));
    times.theirs.push(...(await timesOf(theirs, REQUESTS)));
  }
  return times;
}

async function timesOf(call: Call, count: number): Promise<number[]> {
  const times: number[] = [];
  for (let index = 0; index < count; index += 1) {
    const start = performance.now();
    await call();
    times.push(performance.now() - start);
  }
  return times;
}

function quantile(times: readonly number[], share: number): number {
  const sorted = [...times].sort((a, b) => a - b);
  return sorted[Math.min(Math.floor(sorted.length * share), sorted.length - 1)] ?? Number.NaN;
}
