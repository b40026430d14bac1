/** threads.2.1: 10,000 portals solved, recovered and checked by two threads against one; wall time, nothing stored. */
import { Piscina } from 'piscina';
import { interleaved, median, ratio } from './rounds';
import { portalWorkbook } from './portals';
import type { SolveRange } from './solve-thread';

const frames = 10_000;
const chunk = 50;

export async function twoThreadsAgainstOne(rounds: number): Promise<Record<string, number>> {
  const bytes = await portalWorkbook(1000);
  const filename = new URL('./solve-thread.mjs', import.meta.url).href;
  const pools = [1, 2].map(
    (threads) => new Piscina({ filename, minThreads: threads, maxThreads: threads, idleTimeout: 600_000 }),
  );
  const work = (pool: Piscina | undefined) => async (): Promise<void> => {
    const ranges: SolveRange[] = [];
    for (let from = 0; from < frames; from += chunk) ranges.push({ bytes, from, to: from + chunk });
    const solved = await Promise.all(ranges.map((range): Promise<number> => pool?.run(range) ?? Promise.resolve(0)));
    const total = solved.reduce((sum, each) => sum + each, 0);
    if (total !== frames) throw new Error(`Expected ${frames} portals solved, got ${total}`);
  };
  const [one = [], two = []] = await interleaved([{ name: 'one', work: work(pools[0]) }, { name: 'two', work: work(pools[1]) }], rounds, 'wall'); // prettier-ignore
  await Promise.all(pools.map((pool) => pool.close()));
  console.log(`  one thread ${median(one).toFixed(2)} s, two ${median(two).toFixed(2)} s for ${frames} portals`);
  return { 'threads.2.1': ratio(one, two) };
}
