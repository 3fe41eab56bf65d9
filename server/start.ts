/** Starts the whole service and gives back the way to stop it. */
import { mkdirSync } from 'node:fs';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { setTimeout as wait } from 'node:timers/promises';
import type { Logger } from 'pino';
import { inAct } from '@/server/act';
import { createApp } from '@/server/app';
import { createBackground } from '@/server/background';
import { systemClock, systemRandom } from '@/server/clock';
import type { Config } from '@/server/config';
import { createDatabase } from '@/server/db/connection';
import { createMigrator } from '@/server/db/migrate';
import { seedDemo } from '@/server/db/seeds/seed-demo';
import type { Deps } from '@/server/deps';
import { recoverImports } from '@/server/features/imports/import.service';
import { createOutboxMailer } from '@/server/features/outbox/outbox.service';
import { findPractice, storePractice } from '@/server/features/practice/practice.service';
import { createThrottle } from '@/server/http/throttle';
import { createMailer } from '@/server/mail/mailer';
import { loadTokenSecret } from '@/server/secret';

export interface RunningServer {
  port: number;
  deps: Deps;
  stop(): Promise<void>;
}

/** How long requests, and then mails and imports, may take to end after the signal to stop. */
const DRAIN_MS = 10_000;

export async function startServer(config: Config, logger: Logger): Promise<RunningServer> {
  mkdirSync(config.dataFolder, { recursive: true, mode: 0o700 });
  const deps = await createDeps(config, logger);
  try {
    await createMigrator(deps.db.sequelize).up();
    await prepareData(deps);
    await recoverImports(deps);
    const server = await listen(deps);
    const { port } = server.address() as AddressInfo;
    return { port, deps, stop: () => stop(server, deps) };
  } catch (error) {
    await release(deps);
    throw error;
  }
}

async function createDeps(config: Config, logger: Logger): Promise<Deps> {
  const db = createDatabase({ storagePath: config.databasePath });
  const outbox = { db, clock: systemClock, random: systemRandom };
  return {
    config,
    logger,
    db,
    clock: systemClock,
    random: systemRandom,
    mailer: config.smtpUrl ? createMailer(config.smtpUrl) : await createOutboxMailer(outbox),
    background: createBackground(logger),
    throttle: createThrottle(systemClock),
    tokenSecret: loadTokenSecret(config.dataFolder),
  };
}

/** A new database is filled; a demonstration is never taken for the real thing, its passwords are public. */
async function prepareData(deps: Deps): Promise<void> {
  const practice = await findPractice();
  if (!practice) return fillNewDatabase(deps);
  if (practice.isDemo && !deps.config.isDemo)
    throw new Error(
      `${deps.config.dataFolder} holds the demonstration: give the practice a folder of its own`,
    );
}

async function fillNewDatabase(deps: Deps): Promise<void> {
  if (deps.config.isDemo) return seedDemo(deps);
  const practice = { name: deps.config.practiceName, isDemo: false };
  await inAct(deps, { actor: null, requestId: null }, (act) => storePractice(act, practice));
}

function listen(deps: Deps): Promise<Server> {
  return new Promise((resolve, reject) => {
    const server = createApp(deps).listen(deps.config.port, (error) =>
      error ? reject(error) : resolve(server),
    );
  });
}

/** No new requests, let the running ones end, empty the queues, fold the log into the database file, close. */
async function stop(server: Server, deps: Deps): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  server.closeIdleConnections();
  const drained = setTimeout(() => server.closeAllConnections(), DRAIN_MS);
  await closed;
  clearTimeout(drained);
  await Promise.race([deps.background.idle(), wait(DRAIN_MS, undefined, { ref: false })]);
  await release(deps);
}

async function release({ db, mailer }: Deps): Promise<void> {
  await mailer.close();
  await db.close();
}
