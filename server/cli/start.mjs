/** `npm start`: install and build what is missing, then run the server in the foreground. */
import { spawn } from 'node:child_process';
import { ensureDependencies, ensureWebBuild, ROOT } from './prepare.mjs';

ensureDependencies();
ensureWebBuild();

const server = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
  cwd: ROOT,
  stdio: 'inherit',
  env: { UV_THREADPOOL_SIZE: '16', ...process.env, NODE_ENV: process.env.NODE_ENV ?? 'production' },
});
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => server.kill(signal));
server.on('exit', (code, signal) => process.exit(code ?? (signal === null ? 0 : 1)));
