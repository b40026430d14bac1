import type { Verdict } from '@/lib/results/result';

const step = 0.025;

export interface SpreadFrame {
  readonly ratio: number;
  readonly verdict: Verdict | null;
}

/** Verdicts of a ratio, as a bar stacks them from its foot. */
export const stacked = ['within', 'near', 'over', 'not checked'] as const;

export interface SpreadBin {
  readonly from: number;
  readonly to: number;
  readonly count: number;
  /**
   * Frames by verdict: above the near limit some checks know no near, and their frames stay within; a frame of which something
   * is not checked stays not checked, whatever the ratio of the rest.
   */
  readonly of: Readonly<Record<(typeof stacked)[number], number>>;
}

/**
 * Steps of 0.025 that never straddle 1.00 (a ratio of exactly 1.00 is near, so a step is open below, closed above) nor
 * the near limit (closed below). Above 1.6 everything stands in the last step.
 */
export function spreadBins(
  frames: readonly SpreadFrame[],
  nearLimit: number,
): { bins: SpreadBin[]; low: number; high: number; above: number } {
  const ratios = frames.map(({ ratio }) => ratio);
  const largest = Math.max(1.1, ...ratios.filter(Number.isFinite));
  const smallest = Math.min(nearLimit - 0.1, ...ratios);
  const low = Math.max(0, Math.floor(smallest * 10) / 10);
  const high = Math.min(1.6, Math.ceil((largest + 0.02) * 10) / 10);
  const edges: number[] = [];
  for (let i = Math.round(low / step); i <= Math.round(high / step); i++) edges.push(Number((i * step).toFixed(3)));
  if (!edges.includes(nearLimit) && nearLimit > low) edges.push(nearLimit);
  edges.sort((a, b) => a - b);
  const steps = edges.slice(1).map(() => ({ within: 0, near: 0, over: 0, 'not checked': 0 }));
  const limitAt = edges.indexOf(1);
  for (const { ratio, verdict } of frames) {
    let at = 0;
    while (at < steps.length - 1 && ratio >= (edges[at + 1] ?? Infinity)) at++;
    if (ratio <= 1 && at === limitAt) at = limitAt - 1;
    const from = edges[at] ?? 0;
    const near = from >= nearLimit - 1e-12 && verdict !== 'within';
    const unchecked = verdict === 'not checked' || verdict === null;
    steps[at]![from >= 1 ? 'over' : unchecked ? 'not checked' : near ? 'near' : 'within'] += 1;
  }
  const bins = steps.map((of, i): SpreadBin => {
    return { from: edges[i] ?? 0, to: edges[i + 1] ?? 0, count: of.within + of.near + of.over + of['not checked'], of };
  });
  return { bins, low, high, above: ratios.filter((ratio) => ratio > high).length };
}
