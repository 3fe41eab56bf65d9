/** The real server as a process of its own, on a data folder of its own, to be stopped the hard way. */
import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { Role } from '@/shared/contract';
import { inAct } from '@/server/act';
import { createBackground } from '@/server/background';
import { systemClock, systemRandom } from '@/server/clock';
import { readConfig } from '@/server/config';
import { createDatabase } from '@/server/db/connection';
import { createMigrator } from '@/server/db/migrate';
import type { Deps } from '@/server/deps';
import { addActiveAccount } from '@/server/features/accounts/account.service';
import { hashPassword } from '@/server/features/auth/password';
import { storePractice } from '@/server/features/practice/practice.service';
import { createLogger } from '@/server/http/logging';
import { createThrottle } from '@/server/http/throttle';
import { fakeMailer } from './fake-mailer';
import { TEST_PASSWORD } from './test-app';

export interface ServerProcess {
  origin: string;
  child: ChildProcess;
}

/** A data folder with a set-up practice and one account that can sign in. */
export async function prepareDataFolder(email: string, roles: Role[]): Promise<string> {
  const folder = mkdtempSync(join(tmpdir(), 'landfall-process-'));
  const config = readConfig({ LANDFALL_DATA: folder, LANDFALL_DEMO: '0' });
  const logger = createLogger({ isProduction: true });
  const db = createDatabase({ storagePath: config.databasePath });
  const deps: Deps = {
    config,
    logger,
    db,
    clock: systemClock,
    random: systemRandom,
    mailer: fakeMailer(),
    background: createBackground(logger),
    throttle: createThrottle(systemClock),
    tokenSecret: 'not used: the process has its own',
  };
  await createMigrator(db.sequelize).up();
  const passwordHash = await hashPassword(TEST_PASSWORD);
  await inAct(deps, { actor: null, requestId: null }, async (act) => {
    await storePractice(act, { name: 'Test practice', isDemo: false });
    await addActiveAccount(act, { email, displayName: 'Invented Technician', roles, passwordHash });
  });
  await db.close();
  return folder;
}

/** Resolves when the server listens. */
export function startProcess(dataFolder: string): Promise<ServerProcess> {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    cwd: resolve(__dirname, '..', '..'),
    env: {
      ...process.env,
      PORT: '0',
      LANDFALL_DATA: dataFolder,
      LANDFALL_DEMO: '0',
      NODE_ENV: 'production',
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  return new Promise((resolveStart, reject) => {
    let output = '';
    const listen = (chunk: Buffer): void => {
      output += chunk.toString();
      const port = /\(port (\d+)\)/.exec(output)?.[1];
      if (port) resolveStart({ origin: `http://127.0.0.1:${port}`, child });
    };
    child.stdout.on('data', listen);
    child.stderr.on('data', listen);
    child.once('exit', (code) => reject(new Error(`The server ended with ${code}:\n${output}`)));
  });
}

/** Ends the process at once, as a power cut would. */
export function kill({ child }: ServerProcess): Promise<void> {
  return new Promise((resolveEnd) => {
    child.once('exit', () => resolveEnd());
    child.kill('SIGKILL');
  });
}
