/**
 * What has to be there before the product or its tests can run: packages, the web build, a browser.
 * Plain Node without packages, since it is what installs them. Everything is skipped when up to date.
 */
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const ROOT = join(dirname(fileURLToPath(import.meta.url)), '..', '..');

const LOCK_MARK = join(ROOT, 'node_modules', '.landfall-lock');
const BUILD_MARK = join(ROOT, 'dist', '.landfall-build');
const BUILD_SOURCES = [
  'app',
  'shared',
  'formulas',
  'assets',
  'public',
  'app.json',
  'babel.config.js',
  'metro.config.js',
  'package-lock.json',
];
const EXPO_ENV = {
  EXPO_OFFLINE: '1',
  EXPO_NO_TELEMETRY: '1',
  CI: '1',
  // What no screen uses stays out of the download: a fifth less on a first visit.
  EXPO_UNSTABLE_METRO_OPTIMIZE_GRAPH: '1',
  EXPO_UNSTABLE_TREE_SHAKING: '1',
};

/** Runs a command in the project folder with its output shown; throws when it fails. */
export function run(command, args, env = {}) {
  const result = spawnSync(command, args, { cwd: ROOT, stdio: 'inherit', env: { ...process.env, ...env } });
  if (result.error) throw result.error;
  if (result.status !== 0) throw new Error(`${command} ${args.join(' ')} ended with ${result.status}`);
}

/** Installs the locked packages when node_modules does not match the lock file. */
export function ensureDependencies() {
  const lock = digestOf([join(ROOT, 'package-lock.json')]);
  if (readMark(LOCK_MARK) === lock) return;
  console.log('Installing packages (a few minutes the first time) …');
  run('npm', ['ci', '--no-audit', '--no-fund'], nodeHeaders());
  writeFileSync(LOCK_MARK, lock);
}

/** Exports the web client when its sources changed since the last build. */
export function ensureWebBuild() {
  const sources = digestOf(BUILD_SOURCES.flatMap((source) => filesBelow(join(ROOT, source))));
  if (readMark(BUILD_MARK) === sources) return;
  console.log('Building the web client …');
  run(
    'npx',
    ['--no-install', 'expo', 'export', '--platform', 'web', '--output-dir', 'dist', '--clear'],
    EXPO_ENV,
  );
  mkdirSync(dirname(BUILD_MARK), { recursive: true });
  writeFileSync(BUILD_MARK, sources);
}

const CHROMIUM_PATHS = ['/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'];

/** Path of a Chromium; installs Debian's when there is none and the user may. */
export function ensureBrowser() {
  const named = process.env.CHROMIUM_PATH;
  if (named) return named;
  const found = () => CHROMIUM_PATHS.find((path) => existsSync(path));
  if (!found() && process.getuid?.() === 0 && existsSync('/usr/bin/apt-get')) {
    console.log('Installing Chromium …');
    run('apt-get', ['update', '-qq']);
    run('apt-get', ['install', '-y', '-qq', 'chromium'], { DEBIAN_FRONTEND: 'noninteractive' });
  }
  const path = found();
  if (!path)
    throw new Error('No Chromium found: install it (Debian: apt-get install chromium) or set CHROMIUM_PATH.');
  return path;
}

/** sqlite3 is compiled on this machine when no ready build fits; it then needs Node's own headers. */
function nodeHeaders() {
  const prefix = join(dirname(process.execPath), '..');
  const hasHeaders = existsSync(join(prefix, 'include', 'node', 'node_version.h'));
  return hasHeaders ? { npm_config_nodedir: prefix } : {};
}

function readMark(path) {
  return existsSync(path) ? readFileSync(path, 'utf8') : undefined;
}

function filesBelow(path) {
  if (!existsSync(path)) return [];
  if (!statSync(path).isDirectory()) return [path];
  return readdirSync(path)
    .sort()
    .flatMap((name) => filesBelow(join(path, name)));
}

function digestOf(paths) {
  const hash = createHash('sha256');
  for (const path of paths) hash.update(path.slice(ROOT.length)).update('\0').update(readFileSync(path));
  return hash.digest('hex');
}
