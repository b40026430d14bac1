import { build } from 'esbuild';

const root = new URL('../..', import.meta.url).pathname;

/** Bundles a program of `tests/setup` that is run, and killed, as a process of its own. @param outfile where it is written */
export async function buildChild(name: string, outfile: string): Promise<void> {
  await build({
    entryPoints: [`${root}tests/setup/${name}`],
    outfile,
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    tsconfig: `${root}tsconfig.json`,
    logLevel: 'warning',
  });
}
