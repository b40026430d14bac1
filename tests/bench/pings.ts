/** How long a small request takes, asked every 20 ms over one kept connection, as a page at rest would. */
import { Agent, get } from 'node:http';
import { percentile } from './rounds';

const every_ms = 20;

function ask(url: string, agent: Agent): Promise<number> {
  const began = performance.now();
  return new Promise((resolve, reject) => {
    get(url, { agent }, (answer) => {
      if (answer.statusCode !== 200) reject(new Error(`Expected an answer, got ${answer.statusCode}`));
      answer.resume();
      answer.on('end', () => resolve(performance.now() - began));
    }).on('error', reject);
  });
}

/**
 * Asks until `until` settles; the next request leaves 20 ms after the last left, or when that is answered.
 * @returns milliseconds of each answer
 */
export async function pings(url: string, until: Promise<unknown>): Promise<number[]> {
  const agent = new Agent({ keepAlive: true, maxSockets: 1 });
  const took: number[] = [];
  let going = true;
  const end = (): void => void (going = false);
  until.then(end, end);
  while (going) {
    const ms = await ask(`${url}/api/ping`, agent);
    took.push(ms);
    await new Promise((resolve) => setTimeout(resolve, Math.max(0, every_ms - ms)));
  }
  agent.destroy();
  return took;
}

export const p95 = (took: readonly number[]): number => percentile(took, 0.95);

export const told = (took: readonly number[]): string =>
  `p95 ${p95(took).toFixed(2)} ms (median ${percentile(took, 0.5).toFixed(2)}, largest ${Math.max(...took).toFixed(0)}, ${took.length} requests)`;
