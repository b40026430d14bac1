/** `npm run bench [-- --json FILE] [--peers] [GROUP …]`: bundles bench.ts and runs it. */
import { build } from 'esbuild';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';

const here = new URL('.', import.meta.url).pathname;
const root = join(here, '..', '..');
const outdir = join(root, 'dist-worker', 'bench');
await build({
  entryPoints: ['bench.ts', 'solve-thread.ts'].map((name) => join(here, name)),
  outdir,
  outExtension: { '.js': '.mjs' },
  bundle: true,
  splitting: true,
  platform: 'node',
  target: 'node20',
  format: 'esm',
  packages: 'external',
  alias: { 'server-only': join(root, 'tests', 'setup', 'server-only.ts') },
  tsconfig: join(root, 'tsconfig.json'),
  logLevel: 'warning',
});
process.env['TALLYFRAME_BENCH'] = here;
const { bench } = await import(pathToFileURL(join(outdir, 'bench.mjs')).href);
process.exitCode = await bench(process.argv.slice(2));
