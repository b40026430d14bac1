/** Speed by ratio within one run: what is compared is measured in turn, warm, the median of at least five rounds. */
import { writeFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { chainAgainstBare, codeChainAgainstBare } from './chain';
import { installPeers } from './peers/eigen-peer';
import { profileChain } from './profile';
import { queries } from './queries';
import { recoverAgainstSolve } from './recover';
import { everydayAgainstBare, secondAgainstFirst } from './second-order';
import { serverUnderLoad } from './server';
import { sizeAgainstRun } from './size';
import { solveAgainstPeers } from './solve';
import { twoThreadsAgainstOne } from './threads';

/** What each key must reach. */
const must: Readonly<Record<string, { readonly limit: number; readonly atLeast?: boolean }>> = {
  'solve.P.eigen': { limit: 1.1 },
  'solve.R.eigen': { limit: 1.1 },
  'solve.B.eigen': { limit: 1.6 },
  'solve.L.eigen': { limit: 3 },
  'solve.P.dense': { limit: 1 / 12 },
  'solve.R.dense': { limit: 1 / 30 },
  'recover.P.solve': { limit: 25 },
  'second.P.first': { limit: 15 },
  'chain.W.eigen': { limit: 50 },
  'chain.1000.io': { limit: 1.5 },
  'chain.1000.code.io': { limit: 3 },
  'threads.2.1': { limit: 1.6, atLeast: true },
  'size.240.run': { limit: 20 },
  'query.page.bare': { limit: 5 },
  'query.page.growth': { limit: 3 },
  'query.summary.growth': { limit: 12 },
  'ping.busy.idle': { limit: 3 },
  'ping.busy2.idle': { limit: 3 },
  'rss.20000.MB': { limit: 800 },
};

const groups: readonly (readonly [string, () => Promise<Record<string, number>>])[] = [
  ['solve', () => solveAgainstPeers(7)],
  ['recover', () => recoverAgainstSolve(5)],
  ['second', () => secondAgainstFirst(5)],
  ['everyday', () => everydayAgainstBare(5)],
  ['chain', () => chainAgainstBare(Number(process.env['BENCH_ROUNDS'] ?? 5))],
  ['code', () => codeChainAgainstBare(Number(process.env['BENCH_ROUNDS'] ?? 5))],
  ['profile', async () => (await profileChain(), {})],
  ['size', () => sizeAgainstRun(5)],
  ['queries', () => queries(5)],
  ['threads', () => twoThreadsAgainstOne(5)],
  ['server', () => serverUnderLoad(Number(process.env['BENCH_FRAMES'] ?? 20_000))],
];

/**
 * @param words `--json FILE` writes the figures as one object; `--peers` installs g++ and Eigen through apt where they are
 *   missing; other words name the groups to measure
 */
export async function bench(words: readonly string[]): Promise<number> {
  const at = words.indexOf('--json');
  const file = at >= 0 ? words[at + 1] : undefined;
  if (at >= 0 && file === undefined) {
    console.error('--json needs the name of a file');
    return 2;
  }
  if (words.includes('--peers')) installPeers();
  const named = words.filter((word, index) => word !== '--json' && word !== '--peers' && (at < 0 || index !== at + 1));
  const figures: Record<string, number> = {};
  for (const [name, measure] of groups) {
    if (named.length > 0 && !named.includes(name)) continue;
    console.log(`${name} …`);
    Object.assign(figures, await measure());
  }
  for (const [key, value] of Object.entries(figures)) {
    const target = must[key];
    const met = target === undefined || (target.atLeast ? value >= target.limit : value <= target.limit);
    const words = target
      ? `${target.atLeast ? 'at least' : 'at most'} ${Number(target.limit.toPrecision(4))}: ${met ? 'met' : 'MISSED'}`
      : '';
    console.log(`${key.padEnd(22)} ${value.toPrecision(4).padStart(9)}   ${words}`);
  }
  if (file !== undefined) writeFileSync(resolve(process.env['INIT_CWD'] ?? '.', file), `${JSON.stringify(figures, null, 2)}\n`);
  return 0;
}
