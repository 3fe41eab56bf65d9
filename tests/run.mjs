/**
 * `npm test`: everything that must hold, in one go, on a machine that may have nothing installed yet.
 * Static checks count as one test each. The last line sums all runners: `N passed, N failed`.
 */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ensureBrowser, ensureDependencies, ensureWebBuild, ROOT } from '../server/cli/prepare.mjs';

const CHECKS = [
  ['route types', ['npx', '--no-install', 'expo', 'customize', 'tsconfig.json']],
  ['types', ['npx', '--no-install', 'tsc', '--noEmit', '-p', '.']],
  ['lint', ['npx', '--no-install', 'eslint', '.', '--max-warnings', '0']],
  ['format', ['npx', '--no-install', 'prettier', '--check', '.']],
  ['import rules', ['npx', '--no-install', 'depcruise', 'app', 'server', 'shared', 'formulas', 'tests']],
];

const totals = { passed: 0, failed: 0 };
const report = mkdtempSync(join(tmpdir(), 'landfall-tests-'));
const only = process.argv.slice(2);
const wanted = (stage) => only.length === 0 || only.includes(stage);

ensureDependencies();
if (wanted('checks')) for (const [name, command] of CHECKS) count(name, runs(command) ? [1, 0] : [0, 1]);
if (wanted('jest')) count('jest', jest());
if (wanted('e2e')) count('browser', browser());
rmSync(report, { recursive: true, force: true });

console.log(`\n${totals.passed} passed, ${totals.failed} failed`);
process.exit(totals.failed === 0 ? 0 : 1);

function count(name, [passed, failed]) {
  totals.passed += passed;
  totals.failed += failed;
  console.log(`[${failed === 0 ? 'ok' : 'FAILED'}] ${name}: ${passed} passed, ${failed} failed\n`);
}

function runs([command, ...args], env = {}) {
  const offline = { EXPO_OFFLINE: '1', EXPO_NO_TELEMETRY: '1' };
  const result = spawnSync(command, args, {
    cwd: ROOT,
    stdio: 'inherit',
    env: { ...process.env, ...offline, ...env },
  });
  return result.status === 0;
}

function jest() {
  const file = join(report, 'jest.json');
  const succeeded = runs(['npx', '--no-install', 'jest', '--json', `--outputFile=${file}`, '--silent']);
  return counted(succeeded, () => {
    const result = JSON.parse(readFileSync(file, 'utf8'));
    // A suite that cannot even be loaded has no failed test of its own, and still is a failure.
    return [result.numPassedTests, result.numFailedTests + result.numRuntimeErrorTestSuites];
  });
}

function browser() {
  const file = join(report, 'browser.json');
  let succeeded;
  try {
    ensureWebBuild();
    succeeded = runs(['npx', '--no-install', 'playwright', 'test', '-c', 'tests/e2e/playwright.config.ts'], {
      CHROMIUM_PATH: ensureBrowser(),
      PLAYWRIGHT_JSON_OUTPUT_FILE: file,
    });
  } catch (error) {
    console.error(String(error));
    return [0, 1];
  }
  return counted(succeeded, () => {
    const { expected, flaky, unexpected } = JSON.parse(readFileSync(file, 'utf8')).stats;
    return [expected + flaky, unexpected];
  });
}

/** Counts from a report; a runner that failed without a readable report counts as one failure. */
function counted(succeeded, read) {
  let passed = 0;
  let failed = 0;
  try {
    [passed, failed] = read();
  } catch (error) {
    console.error(`No report could be read: ${String(error)}`);
  }
  return [passed, succeeded && passed > 0 ? failed : Math.max(failed, 1)];
}
