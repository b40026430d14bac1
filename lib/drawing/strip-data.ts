import type { Verdict } from '@/lib/results/result';

/** One cell of the strip, in sheet order. Everything but id, verdict and ratio may be absent (long strips, a run). */
export interface StripFrame {
  readonly id: string;
  /** null: not solved, not checked, or not yet run. */
  readonly verdict: Verdict | null;
  readonly ratio: number | null;
  /** During a run: in hand (outlined) or waiting (a tick on the line); absent = done. */
  readonly state?: 'in hand' | 'waiting';
  readonly group?: string | null;
  /** For the readout: "normal stress", "rafter BC at B", "IPE 360", "C1". */
  readonly check?: string | null;
  readonly subject?: string | null;
  readonly section?: string | null;
  readonly combination?: string | null;
  /** Why it is not checked. */
  readonly reason?: string | null;
  /** The checker's, where there is one. */
  readonly mark?: 'seen' | 'queried' | 'accepted' | null;
}

/** Frames in order, counted by verdict. */
export type VerdictCounts = Readonly<Record<Verdict, number>>;
export const verdictOrder = ['over', 'near', 'within', 'not checked'] as const satisfies readonly Verdict[];

/** How many frames have each verdict; those not yet run count nowhere. */
export function countVerdicts(frames: readonly StripFrame[]): VerdictCounts {
  const counts = { over: 0, near: 0, within: 0, 'not checked': 0 };
  for (const frame of frames) if (frame.verdict && frame.state === undefined) counts[frame.verdict] += 1;
  return counts;
}

/** The strip's scale ends here: what is above is cut. */
export const stripTop = 1.25;

/** A cell's height for a ratio, in the units of `height`: height × ratio ÷ 1.25, cut at 1.25; 1.00 where there is none. */
export function cellHeight(ratio: number | null, height: number): number {
  const value = ratio === null ? 1 : Math.min(Math.max(ratio, 0), stripTop);
  return (height * value) / stripTop;
}
