/**
 * What a first visit downloads (page, scripts, styles; gzip) beside an empty Expo Router app built with
 * the same packages in the same run.
 */
import { spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import type { BenchRow } from './bench-row';

const ROOT = join(__dirname, '..', '..');
const EMPTY = join(ROOT, 'data', 'bench-empty-app');

export function benchFirstLoad(): BenchRow[] {
  exportWeb(ROOT, join(ROOT, 'data', 'bench-dist'));
  makeEmptyApp();
  exportWeb(EMPTY, join(EMPTY, 'dist'));
  const ours = firstLoadBytes(join(ROOT, 'data', 'bench-dist'));
  const empty = firstLoadBytes(join(EMPTY, 'dist'));
  rmSync(EMPTY, { recursive: true, force: true });
  return [
    { name: 'first load, gzip', value: ours / 1024, unit: 'kB' },
    { name: 'first load of an empty Expo Router app, gzip', value: empty / 1024, unit: 'kB' },
    { name: 'first load, ratio to the empty app', value: ours / empty, unit: '×', aim: '< 1.5' },
  ];
}

function makeEmptyApp(): void {
  rmSync(EMPTY, { recursive: true, force: true });
  mkdirSync(join(EMPTY, 'app'), { recursive: true });
  writeFileSync(
    join(EMPTY, 'app', 'index.tsx'),
    "import { Text } from 'react-native';\nexport default function Index() {\n  return <Text>Empty</Text>;\n}\n",
  );
  writeFileSync(
    join(EMPTY, 'app.json'),
    JSON.stringify({
      expo: {
        name: 'empty',
        slug: 'empty',
        platforms: ['web'],
        web: { bundler: 'metro', output: 'single' },
        plugins: ['expo-router'],
      },
    }),
  );
  const { dependencies } = JSON.parse(readFileSync(join(ROOT, 'package.json'), 'utf8')) as {
    dependencies: object;
  };
  writeFileSync(
    join(EMPTY, 'package.json'),
    JSON.stringify({
      name: 'empty',
      version: '0.0.0',
      private: true,
      main: 'expo-router/entry',
      dependencies,
    }),
  );
  cpSync(join(ROOT, 'babel.config.js'), join(EMPTY, 'babel.config.js'));
  writeFileSync(
    join(EMPTY, 'metro.config.js'),
    `const { getDefaultConfig } = require('expo/metro-config');
const config = getDefaultConfig(__dirname);
config.watchFolders = [${JSON.stringify(join(ROOT, 'node_modules'))}];
config.resolver.nodeModulesPaths = [${JSON.stringify(join(ROOT, 'node_modules'))}];
module.exports = config;
`,
  );
}

function exportWeb(folder: string, output: string): void {
  rmSync(output, { recursive: true, force: true });
  const result = spawnSync(
    'npx',
    ['--no-install', 'expo', 'export', '--platform', 'web', '--output-dir', output, '--clear'],
    {
      cwd: folder,
      env: { ...process.env, EXPO_OFFLINE: '1', EXPO_NO_TELEMETRY: '1', CI: '1' },
      encoding: 'utf8',
    },
  );
  if (result.status !== 0) throw new Error(`expo export failed in ${folder}: ${result.stderr}`);
}

/** Bytes after gzip of index.html and of every script and style that it names. */
function firstLoadBytes(dist: string): number {
  const html = readFileSync(join(dist, 'index.html'), 'utf8');
  const named = [...html.matchAll(/(?:src|href)="(\/[^"]+\.(?:js|css))"/g)].map((match) => match[1] ?? '');
  const files = [...new Set(named)].map((path) => readFileSync(join(dist, path)));
  return [Buffer.from(html), ...files].reduce((sum, bytes) => sum + gzipSync(bytes, { level: 9 }).length, 0);
}
