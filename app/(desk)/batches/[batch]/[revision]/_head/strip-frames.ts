import type { StripFrame } from '@/lib/drawing/strip-data';
import type { Verdict } from '@/lib/results/result';

/** A frame as the summary route gives it. */
export interface GlanceCell {
  readonly index: number;
  readonly id: string;
  readonly status: 'stopped' | 'waiting' | 'solved' | 'not solved';
  readonly verdict: Verdict | null;
  readonly ratio: number | null;
  readonly check: string | null;
  readonly subject: string | null;
  readonly section: string | null;
  readonly combination: string | null;
  readonly group: string | null;
}

/** Above this many frames the strip's readout names verdict and ratio only, to keep the page light. */
const longStrip = 3000;

/**
 * A frame that errors stop, or that was not run, is not checked; during a run it waits, or is in hand.
 *
 * @param inHand places, from 0, of the frames being solved
 */
export function stripFrames(cells: readonly GlanceCell[], running = false, inHand: readonly number[] = []): StripFrame[] {
  const held = new Set(inHand);
  return cells.map(({ index, id, status, verdict, ratio, group, check, subject, section, combination }) => {
    const waiting = running && status === 'waiting';
    const reason =
      status === 'stopped' ? 'stopped by errors in its sheets' : status === 'waiting' && !waiting ? 'not run yet' : null;
    const cell: StripFrame = {
      id,
      verdict: verdict ?? 'not checked',
      ratio,
      group,
      ...(waiting && { state: held.has(index) ? ('in hand' as const) : ('waiting' as const) }),
    };
    return cells.length > longStrip ? cell : { ...cell, check, subject, section, combination, reason };
  });
}

/** The same with the checker's marks, by place from 0. */
export function markedFrames(
  frames: readonly StripFrame[],
  marks: ReadonlyMap<number, StripFrame['mark']>,
): readonly StripFrame[] {
  return marks.size === 0 ? frames : frames.map((frame, i) => ({ ...frame, mark: marks.get(i) ?? null }));
}
