import type { Verdict } from '@/lib/results/result';

const step = 0.025;

export interface SpreadBin {
  readonly from: number;
  readonly to: number;
  readonly verdict: Exclude<Verdict, 'not checked'>;
  readonly count: number;
}

/**
 * Steps of 0.025 that never straddle 1.00 (a ratio of exactly 1.00 is near, so a step is open below, closed above) nor
 * the near limit (closed below). Above 1.6 everything stands in the last step.
 */
export function spreadBins(
  ratios: readonly number[],
  nearLimit: number,
): { bins: SpreadBin[]; low: number; high: number; above: number } {
  const largest = Math.max(1.1, ...ratios.filter(Number.isFinite));
  const smallest = Math.min(nearLimit - 0.1, ...ratios);
  const low = Math.max(0, Math.floor(smallest * 10) / 10);
  const high = Math.min(1.6, Math.ceil((largest + 0.02) * 10) / 10);
  const edges: number[] = [];
  for (let i = Math.round(low / step); i <= Math.round(high / step); i++) edges.push(Number((i * step).toFixed(3)));
  if (!edges.includes(nearLimit) && nearLimit > low) edges.push(nearLimit);
  edges.sort((a, b) => a - b);
  const counts = new Array<number>(edges.length - 1).fill(0);
  const limitAt = edges.indexOf(1);
  for (const ratio of ratios) {
    let at = 0;
    while (at < counts.length - 1 && ratio >= (edges[at + 1] ?? Infinity)) at++;
    if (ratio <= 1 && at === limitAt) at = limitAt - 1;
    counts[at] = (counts[at] ?? 0) + 1;
  }
  const bins = counts.map((count, i): SpreadBin => {
    const from = edges[i] ?? 0;
    return { from, to: edges[i + 1] ?? 0, count, verdict: from >= 1 ? 'over' : from >= nearLimit - 1e-12 ? 'near' : 'within' };
  });
  return { bins, low, high, above: ratios.filter((ratio) => ratio > high).length };
}
