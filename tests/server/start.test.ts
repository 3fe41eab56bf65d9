import { existsSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { readConfig, type Config } from '@/server/config';
import { DEMO_PRACTICE_NAME } from '@/server/db/seeds/seed-demo';
import { AccountModel } from '@/server/db/models/account';
import { createLogger } from '@/server/http/logging';
import { startServer, type RunningServer } from '@/server/start';
import { openBrowser } from '@/tests/support/browser';
import { temporaryFolder } from '@/tests/support/temporary-folder';

const folder = temporaryFolder();
const config: Config = { ...readConfig({ LANDFALL_DATA: join(folder.path, 'data') }), port: 0 };
const logger = createLogger({ isProduction: true, level: 'silent' });
let server: RunningServer;

const start = async (): Promise<void> => {
  server = await startServer(config, logger);
};
const practice = async () => (await fetch(`http://localhost:${server.port}/api/practice`)).json();

afterAll(() => folder.remove());

describe('starting and stopping', () => {
  it('fills a new database with the demonstration, whose accounts can sign in', async () => {
    await start();
    const { demoAccounts, ...rest } = await practice();

    expect(rest).toEqual({
      name: DEMO_PRACTICE_NAME,
      isDemo: true,
      needsFirstAdministrator: false,
    });
    expect(demoAccounts.map(({ roles }: { roles: string[] }) => roles)).toEqual([
      ['technician'],
      ['surgeon'],
      ['counsellor'],
      ['nurse'],
      ['administrator'],
    ]);
    for (const { email, password, displayName } of demoAccounts) {
      expect(email).toMatch(/@landfall\.example$/);
      expect(password.length).toBeGreaterThanOrEqual(15);
      expect(displayName).toMatch(/\(demo\)$/);
      const reply = await openBrowser(`http://localhost:${server.port}`).signIn(email, password);
      expect(reply.status).toBe(200);
    }
    expect(statSync(config.dataFolder).mode & 0o777).toBe(0o700);
  }, 30_000);

  it('stops with everything in one file', async () => {
    await server.stop();

    expect(existsSync(config.databasePath)).toBe(true);
    expect(existsSync(`${config.databasePath}-wal`)).toBe(false);
    await expect(practice()).rejects.toThrow();
  });

  it('starts again with the same data and fills nothing in twice', async () => {
    await start();
    const { demoAccounts } = await practice();
    const accounts = await AccountModel.count();
    await server.stop();

    expect(demoAccounts).toHaveLength(5);
    expect(accounts).toBe(5);
  });

  it('refuses to run a real practice on the data of the demonstration', async () => {
    await expect(startServer({ ...config, isDemo: false }, logger)).rejects.toThrow(/folder of its own/);
  });
});
