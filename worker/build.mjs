/**
 * Bundles what runs in worker threads and on the command line into dist-worker/*.mjs.
 * `buildWorker()` skips when nothing that went into the last bundle has changed; `--watch` keeps building.
 */
import { existsSync, mkdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const out = join(root, 'dist-worker');
const record = join(out, 'inputs.json');

/** Bundle's name → its entry. Listed, not globbed: what is not named here is not shipped. */
const entries = {
  read: 'worker/threads/read.ts',
  solve: 'worker/threads/solve.ts',
  write: 'worker/threads/write.ts',
  batch: 'worker/batch.ts',
  seed: 'worker/seed/seed.ts',
};

const options = {
  absWorkingDir: root,
  bundle: true,
  platform: 'node',
  target: 'node20',
  format: 'esm',
  outExtension: { '.js': '.mjs' },
  sourcemap: true,
  tsconfig: 'tsconfig.json',
  // Native addons, and packages that look for files beside themselves at run time.
  external: ['better-sqlite3', '@node-rs/argon2', 'piscina', 'pino', 'pdfkit'],
  // Lets bundled CommonJS dependencies call require() from ESM output.
  banner: {
    js: "import { createRequire as __createRequire } from 'node:module'; const require = __createRequire(import.meta.url);",
  },
  metafile: true,
  logLevel: 'warning',
};

const present = () => Object.fromEntries(Object.entries(entries).filter(([, file]) => existsSync(join(root, file))));
const print = (file) => {
  const info = statSync(join(root, file), { throwIfNoEntry: false });
  return info ? `${info.size} ${info.mtimeMs}` : 'gone';
};

/** True where every bundle is there and nothing that went into them has changed since. */
function fresh() {
  if (!existsSync(record)) return false;
  try {
    const { names, inputs } = JSON.parse(readFileSync(record, 'utf8'));
    return (
      JSON.stringify(names) === JSON.stringify(Object.keys(present())) &&
      names.every((name) => existsSync(join(out, `${name}.mjs`))) &&
      Object.entries(inputs).every(([file, was]) => print(file) === was)
    );
  } catch {
    return false;
  }
}

/** Builds the bundles unless they are fresh. A bundle in use is replaced whole, never half written. */
export async function buildWorker() {
  if (fresh()) return;
  const { build, stop } = await import('esbuild');
  const part = join(out, `.part-${process.pid}`);
  mkdirSync(part, { recursive: true });
  try {
    const { metafile } = await build({ ...options, entryPoints: present(), outdir: part });
    const inputs = Object.keys(metafile.inputs).filter((file) => !file.startsWith('<'));
    const names = Object.keys(present());
    for (const name of names)
      for (const end of ['mjs', 'mjs.map']) renameSync(join(part, `${name}.${end}`), join(out, `${name}.${end}`));
    const all = [...inputs, 'worker/build.mjs', 'package-lock.json'];
    writeFileSync(
      join(part, 'inputs.json'),
      JSON.stringify({ names, inputs: Object.fromEntries(all.map((f) => [f, print(f)])) }),
    );
    renameSync(join(part, 'inputs.json'), record);
  } finally {
    rmSync(part, { recursive: true, force: true });
    // Else the bundler's own process would stand beside the server for as long as that runs, with some 300 MB.
    await stop();
  }
}

async function watch() {
  const { context } = await import('esbuild');
  rmSync(record, { force: true });
  const building = await context({ ...options, entryPoints: present(), outdir: out });
  await building.watch();
}

if (process.argv[1] && resolve(process.argv[1]) === fileURLToPath(import.meta.url)) {
  if (process.argv.includes('--watch')) await watch();
  else await buildWorker();
}
