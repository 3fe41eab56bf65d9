import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { defineConfig } from '@playwright/test';

/** The exported web build served by the real server on a new demo database: what a user gets from `npm start`. */
const PORT = Number(process.env.E2E_PORT ?? 3107);
const ROOT = join(__dirname, '..', '..');
const dataFolder = process.env.E2E_DATA ?? mkdtempSync(join(tmpdir(), 'landfall-e2e-'));
process.env.E2E_DATA = dataFolder;

export default defineConfig({
  testDir: __dirname,
  testMatch: '**/*.e2e.ts',
  outputDir: join(ROOT, 'test-results'),
  // One server and one database: journeys run one after the other and use patients of their own.
  workers: 1,
  fullyParallel: false,
  timeout: 45_000,
  expect: { timeout: 10_000 },
  reporter: [['list'], ['json']],
  use: {
    actionTimeout: 10_000,
    baseURL: `http://localhost:${PORT}`,
    locale: 'en-GB',
    timezoneId: 'UTC',
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
  projects: [
    { name: 'phone', use: { viewport: { width: 390, height: 844 }, hasTouch: true } },
    { name: 'wide', use: { viewport: { width: 1440, height: 900 } } },
  ],
  webServer: {
    command: 'node --import tsx server/index.ts',
    cwd: ROOT,
    url: `http://localhost:${PORT}/readyz`,
    timeout: 60_000,
    reuseExistingServer: false,
    stdout: 'ignore',
    env: { PORT: String(PORT), LANDFALL_DATA: dataFolder, UV_THREADPOOL_SIZE: '16' },
  },
});
