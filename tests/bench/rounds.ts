/** Interleaved rounds: what is compared is measured in turn, so that a drifting machine drifts for both. */
import { setFlagsFromString } from 'node:v8';
import { runInNewContext } from 'node:vm';

setFlagsFromString('--expose-gc');
/** Collects what earlier work left, so that its collection is not counted as later work's. */
export const sweep = runInNewContext('gc') as () => void;

export interface Contender {
  readonly name: string;
  readonly work: () => Promise<void> | void;
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = Math.floor(sorted.length / 2);
  const upper = sorted[middle] ?? NaN;
  return sorted.length % 2 === 1 ? upper : (upper + (sorted[middle - 1] ?? NaN)) / 2;
}

export function percentile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(share * sorted.length) - 1)] ?? NaN;
}

/** CPU time of this process, s. */
export function cpuSeconds(): number {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1e6;
}

/**
 * Runs every contender once to warm it, then `rounds` times in turn.
 * @param clock CPU time of this process (arithmetic), or wall time (threads)
 * @returns seconds of each round, by contender
 */
export async function interleaved(contenders: readonly Contender[], rounds: number, clock: 'cpu' | 'wall'): Promise<number[][]> {
  const now = clock === 'cpu' ? cpuSeconds : (): number => performance.now() / 1e3;
  const times: number[][] = contenders.map(() => []);
  sweep();
  for (let round = 0; round <= rounds; round += 1) {
    for (const [index, contender] of contenders.entries()) {
      const before = now();
      await contender.work();
      if (round > 0) times[index]?.push(now() - before);
    }
  }
  return times;
}

/** Median of the ratios round by round. */
export function ratio(over: readonly number[], under: readonly number[]): number {
  return median(over.map((value, index) => value / (under[index] ?? NaN)));
}
