/**
 * The real application on a database file of its own, with real migrations. Only clock and mail are replaced.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Writable } from 'node:stream';
import type { Express } from 'express';
import request, { type Test } from 'supertest';
import type { Role } from '@/shared/contract';
import { inAct } from '@/server/act';
import { createApp } from '@/server/app';
import { createBackground } from '@/server/background';
import { systemRandom } from '@/server/clock';
import { readConfig, type Config } from '@/server/config';
import { createDatabase } from '@/server/db/connection';
import { createMigrator } from '@/server/db/migrate';
import type { Deps } from '@/server/deps';
import { addActiveAccount } from '@/server/features/accounts/account.service';
import { startFamily } from '@/server/features/auth/session.service';
import { storePractice } from '@/server/features/practice/practice.service';
import { signAccessToken } from '@/server/http/access-token';
import { createLogger } from '@/server/http/logging';
import { createThrottle } from '@/server/http/throttle';
import { fakeClock, type FakeClock } from './fake-clock';
import { fakeMailer, type FakeMailer } from './fake-mailer';

/** Password of every account that `signInAs` makes, and its hash made beforehand: hashing is slow on purpose. */
export const TEST_PASSWORD = 'lamp-on-the-long-pier';
const TEST_PASSWORD_HASH =
  'scrypt$131072$8$1$E1RcOxCl2uO9ExX0uWESJA==$HvO1PnIpqiSJO+yxl+wU8AvEBrvG1n+rKwHLU5dSOuM=';

export interface SignedIn {
  id: string;
  email: string;
  displayName: string;
  accessToken: string;
  get(path: string): Test;
  post(path: string, body?: object): Test;
  /** `version` becomes If-Match; leave it out to send none. */
  put(path: string, body: object, version?: number): Test;
  delete(path: string, version?: number): Test;
}

export interface TestApp {
  app: Express;
  deps: Deps;
  clock: FakeClock;
  mailer: FakeMailer;
  /** What was logged so far. */
  log(): string;
  signInAs(roles: Role | Role[]): Promise<SignedIn>;
  close(): Promise<void>;
}

export async function startTestApp(overrides: Partial<Config> = {}): Promise<TestApp> {
  const folder = mkdtempSync(join(tmpdir(), 'landfall-test-'));
  const clock = fakeClock();
  const mailer = fakeMailer();
  const log = memoryLog();
  const config = {
    ...readConfig({ LANDFALL_DATA: folder, LANDFALL_DEMO: '0' }),
    webFolder: join(folder, 'no-web-build'),
    ...overrides,
  };
  const logger = createLogger({ isProduction: config.isProduction, destination: log.stream });
  const deps: Deps = {
    config,
    clock,
    mailer,
    logger,
    random: systemRandom,
    db: createDatabase({ storagePath: config.databasePath }),
    background: createBackground(logger),
    throttle: createThrottle(clock),
    tokenSecret: 'only-for-tests-only-for-tests-only-for-tests',
  };
  await createMigrator(deps.db.sequelize).up();
  await inAct(deps, NOBODY, (act) => storePractice(act, { name: 'Test practice', isDemo: false }));
  const app = createApp(deps);
  return {
    app,
    deps,
    clock,
    mailer,
    log: log.read,
    signInAs: (roles) => signIn(app, deps, Array.isArray(roles) ? roles : [roles]),
    close: async () => {
      await deps.background.idle();
      await deps.db.close();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

const NOBODY = { actor: null, requestId: null };
let accountsMade = 0;

/** A new account with these roles and a sign-in of its own, without the cost of a password hash. */
async function signIn(app: Express, deps: Deps, roles: Role[]): Promise<SignedIn> {
  accountsMade += 1;
  const email = `person-${accountsMade}@practice.example`;
  const displayName = `Person ${accountsMade}`;
  const { id, token } = await inAct(deps, NOBODY, async (act) => {
    const person = { email, displayName, roles, passwordHash: TEST_PASSWORD_HASH };
    const account = await addActiveAccount(act, person);
    const { familyId } = await startFamily(deps, account.id, act.transaction);
    const key = { secret: deps.tokenSecret, clock: deps.clock };
    return { id: account.id, token: signAccessToken(key, { accountId: account.id, familyId }) };
  });
  const withToken = (test: Test): Test => test.set('Authorization', `Bearer ${token}`);
  const withVersion = (test: Test, version: number | undefined): Test =>
    version === undefined ? test : test.set('If-Match', `"${version}"`);
  return {
    id,
    email,
    displayName,
    accessToken: token,
    get: (path) => withToken(request(app).get(path)),
    post: (path, body = {}) => withToken(request(app).post(path)).send(body),
    put: (path, body, version) => withVersion(withToken(request(app).put(path)), version).send(body),
    delete: (path, version) => withVersion(withToken(request(app).delete(path)), version),
  };
}

function memoryLog(): { stream: Writable; read: () => string } {
  const chunks: string[] = [];
  const stream = new Writable({
    write(chunk: Buffer, _encoding, done) {
      chunks.push(chunk.toString('utf8'));
      done();
    },
  });
  return { stream, read: () => chunks.join('') };
}
