/**
 * `npm run --silent batch -- FILE… [--json OUT] [--xlsx OUT] [--csv DIR] [--all]`
 * Needs nothing at its start: installs what is missing, bundles worker/batch.ts where that is stale, and runs it in the
 * folder where the command was typed.
 */
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
if (!existsSync(new URL('../node_modules/esbuild', import.meta.url))) {
  const { prepareMachine } = await import('./setup/machine.mjs');
  prepareMachine({ browser: false });
}
const { buildWorker } = await import('./build.mjs');
await buildWorker();
const { runBatch } = await import('../dist-worker/batch.mjs');
// npm changes to the project's folder and says in INIT_CWD where the command was typed.
const typedIn = process.env.npm_lifecycle_event === 'batch' ? (process.env.INIT_CWD ?? root) : process.cwd();
process.exitCode = await runBatch(process.argv.slice(2), typedIn);
