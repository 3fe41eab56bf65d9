/**
 * The plan of one eye: its candidate table in memory, and reading its desk over HTTP beside a bare Express
 * server that reads the same row from the same file with sqlite3.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import express from 'express';
import pino from 'pino';
import sqlite3 from 'sqlite3';
import { defaultSpread, formulaIds, prepareFormula, prepareLanding } from '@/formulas';
import { paths } from '@/shared/contract';
import type { PlanDesk, Practice, Session } from '@/shared/contract';
import { readConfig } from '@/server/config';
import { startServer } from '@/server/start';
import type { BenchRow } from './bench-row';

const REQUESTS = 300;
const WARM_UP = 50;

export async function benchPlan(): Promise<BenchRow[]> {
  const folder = mkdtempSync(join(tmpdir(), 'landfall-bench-'));
  const config = readConfig({ LANDFALL_DATA: folder, PORT: '0' });
  const running = await startServer(config, pino({ level: 'silent' }));
  const origin = `http://localhost:${running.port}`;
  const { token, desk } = await openDraft(origin);
  const bare = await bareServer(config.databasePath, desk.plan.id);
  const ours = await timesOf(`${origin}${paths.plan(desk.plan.id)}`, { Authorization: `Bearer ${token}` });
  const theirs = await timesOf(bare.address, {});
  bare.close();
  await running.stop();
  rmSync(folder, { recursive: true, force: true });
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
    { name: 'plan desk over HTTP, p50', value: quantile(ours, 0.5), unit: 'ms' },
    {
      name: 'plan desk over HTTP, p50 beside a bare read',
      value: quantile(ours, 0.5) / quantile(theirs, 0.5),
      unit: '×',
      aim: '< 3',
    },
    {
      name: 'plan desk over HTTP, p95 beside a bare read',
      value: quantile(ours, 0.95) / quantile(theirs, 0.95),
      unit: '×',
      aim: '< 3',
    },
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

async function openDraft(origin: string): Promise<{ token: string; desk: PlanDesk }> {
  const headers = { 'Content-Type': 'application/json', 'X-Landfall': '1' };
  const read = async <T>(path: string, init: RequestInit = {}): Promise<T> =>
    (await (
      await fetch(origin + path, { ...init, headers: { ...headers, ...(init.headers as object) } })
    ).json()) as T;
  const { demoAccounts } = await read<Practice>(paths.practice());
  const { email, password } = demoAccounts.find(({ roles }) => roles.includes('surgeon')) ?? {
    email: '',
    password: '',
  };
  const { accessToken } = await read<Session>(paths.signIn(), {
    method: 'POST',
    body: JSON.stringify({ email, password }),
  });
  const bearer = { Authorization: `Bearer ${accessToken}` };
  const { items } = await read<{
    items: { id: string; eyes: { stage: string; side: 'right' | 'left' }[] }[];
  }>(paths.patients(), { headers: bearer });
  for (const { id, eyes } of items) {
    const eye = eyes.find(({ stage }) => stage === 'plan');
    if (!eye) continue;
    const desk = await read<PlanDesk>(paths.eyePlans(id, eye.side), {
      method: 'POST',
      body: '{}',
      headers: bearer,
    });
    return { token: accessToken, desk };
  }
  throw new Error('The demonstration has no eye that waits for a plan');
}

async function bareServer(
  databasePath: string,
  planId: string,
): Promise<{ address: string; close: () => void }> {
  const database = new sqlite3.Database(databasePath);
  const app = express();
  app.get('/plan', (_request, response) => {
    database.get('SELECT * FROM plans WHERE id = ?', [planId], (_error, row) => response.json(row));
  });
  const server = await new Promise<Server>((resolve) => {
    const started: Server = app.listen(0, () => resolve(started));
  });
  const { port } = server.address() as AddressInfo;
  return {
    address: `http://localhost:${port}/plan`,
    close: () => {
      server.close();
      database.close();
    },
  };
}

async function timesOf(address: string, headers: Record<string, string>): Promise<number[]> {
  const times: number[] = [];
  for (let index = 0; index < REQUESTS + WARM_UP; index += 1) {
    const start = performance.now();
    await (await fetch(address, { headers })).arrayBuffer();
    times.push(performance.now() - start);
  }
  return times.slice(WARM_UP);
}

function quantile(times: readonly number[], share: number): number {
  const sorted = [...times].sort((a, b) => a - b);
  return sorted[Math.min(Math.floor(sorted.length * share), sorted.length - 1)] ?? Number.NaN;
}
