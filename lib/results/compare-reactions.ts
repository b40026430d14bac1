/** Reactions of a frame before and after: at each support the largest and smallest of each direction over all its results. */
import { idKey } from '@/lib/intake/ids';

const directions = ['Fx', 'Fy', 'Mz'] as const;
export type Direction = (typeof directions)[number];

/** One support in one result, N and N·m. */
export interface ReactionRead {
  readonly node: string;
  readonly fx: number;
  readonly fy: number;
  readonly mz: number;
}

/** N, or N·m for Mz. */
export interface Range {
  readonly min: number;
  readonly max: number;
}

export interface ReactionPair {
  readonly frame: string;
  /** The frame's place in the later list, from 0. */
  readonly index: number;
  readonly node: string;
  readonly direction: Direction;
  readonly before: Range | null;
  readonly after: Range | null;
  /** Of largest and smallest the one that moved more, after less before; null where only one revision has the support. */
  readonly change: number | null;
  /** That change as a share of the frame's largest reaction of its kind, force or moment, in either revision. */
  readonly share: number | null;
}

/** Smaller shares than this are rounding. */
const rounding = 1e-9;

/** Supports of a frame that both revisions have solved, in the order of the later one. */
export function pairReactions(
  frame: { readonly id: string; readonly index: number },
  before: readonly ReactionRead[],
  after: readonly ReactionRead[],
): ReactionPair[] {
  const [earlier, later] = [ranges(before), ranges(after)];
  const keys = [...later.keys(), ...[...earlier.keys()].filter((key) => !later.has(key))];
  const peaks = { force: 0, moment: 0 };
  for (const { fx, fy, mz } of [...before, ...after]) {
    peaks.force = Math.max(peaks.force, Math.abs(fx), Math.abs(fy));
    peaks.moment = Math.max(peaks.moment, Math.abs(mz));
  }
  return keys.flatMap((key) => {
    const [one, two] = [earlier.get(key), later.get(key)];
    const node = (two ?? one)!.node;
    return directions.map((direction): ReactionPair => {
      const [was, is] = [one?.[direction] ?? null, two?.[direction] ?? null];
      const change = was && is ? larger(is.max - was.max, is.min - was.min) : null;
      const peak = direction === 'Mz' ? peaks.moment : peaks.force;
      const share = change === null ? null : peak === 0 || Math.abs(change) <= rounding * peak ? 0 : Math.abs(change) / peak;
      return { frame: frame.id, index: frame.index, node, direction, before: was, after: is, change, share };
    });
  });
}

const larger = (a: number, b: number): number => (Math.abs(b) > Math.abs(a) ? b : a);

type Ranges = { readonly node: string } & Record<Direction, Range>;

function ranges(rows: readonly ReactionRead[]): Map<string, Ranges> {
  const found = new Map<string, Ranges>();
  for (const { node, fx, fy, mz } of rows) {
    const key = idKey(node);
    const known = found.get(key);
    if (!known) found.set(key, { node, Fx: { min: fx, max: fx }, Fy: { min: fy, max: fy }, Mz: { min: mz, max: mz } });
    else {
      known.Fx = wider(known.Fx, fx);
      known.Fy = wider(known.Fy, fy);
      known.Mz = wider(known.Mz, mz);
    }
  }
  return found;
}

const wider = ({ min, max }: Range, value: number): Range => ({ min: Math.min(min, value), max: Math.max(max, value) });

/** True where a reaction moved by more than a share of the frame's largest of its kind, or only one revision has it. */
export const reactionMoved = ({ share }: ReactionPair, by: number): boolean => share === null || share > by;

/** The largest movement first. */
export const byReaction = (pairs: readonly ReactionPair[]): ReactionPair[] =>
  [...pairs].sort((a, b) => (b.share ?? Infinity) - (a.share ?? Infinity) || 0);
