/** `npm run dev`: `next dev` beside the bundler of the worker threads in watch mode; both end together. */
import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { buildWorker } from './build.mjs';
import { serverEnvironment } from './server-environment.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
await buildWorker();
const env = { ...serverEnvironment(), NODE_ENV: 'development' };
const start = (args) => spawn(process.execPath, args, { cwd: root, stdio: 'inherit', env });
const both = [start(['worker/build.mjs', '--watch']), start(['node_modules/next/dist/bin/next', 'dev', '-p', env.PORT])];
const stop = () => both.forEach((child) => child.kill('SIGTERM'));
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, stop);
for (const child of both)
  child.on('exit', (code) => {
    stop();
    process.exitCode ??= code ?? 0;
  });
