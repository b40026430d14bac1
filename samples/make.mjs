/** `npm run samples`: bundles make.ts and runs it; writes the sample workbooks and CSV sets beside itself. */
import { build } from 'esbuild';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';

const here = new URL('.', import.meta.url).pathname;
const outfile = join(here, '..', 'dist-worker', 'samples.mjs');
await build({
  entryPoints: [join(here, 'make.ts')],
  outfile,
  bundle: true,
  platform: 'node',
  target: 'node20',
  format: 'esm',
  packages: 'external',
  tsconfig: join(here, '..', 'tsconfig.json'),
  logLevel: 'warning',
});
const { makeSamples } = await import(pathToFileURL(outfile).href);
await makeSamples(here);
