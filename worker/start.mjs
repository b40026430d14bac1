/** `npm start`: serves the built application on PORT, with a secret of its own kept in DATA_DIR. */
import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildWorker } from './build.mjs';
import { serverEnvironment } from './server-environment.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
if (!existsSync(join(root, '.next', 'BUILD_ID'))) {
  console.error('There is no build yet. Run `npm run build` first, or `npm run demo`, which does everything.');
  process.exit(1);
}
await buildWorker();
const env = { ...serverEnvironment(), NODE_ENV: 'production' };
const child = spawn(process.execPath, ['node_modules/next/dist/bin/next', 'start', '-p', env.PORT], {
  cwd: root,
  stdio: 'inherit',
  env,
});
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => child.kill(signal));
child.on('exit', (code, signal) => process.exit(code ?? (signal ? 1 : 0)));
