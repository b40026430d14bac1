/** What moved between two revisions of a batch: their frames and members by name, verdict and ratio before and after. */
import { idKey } from '@/lib/intake/ids';
import type { Verdict } from '@/lib/results/result';

/** A verdict with its ratio. Where nothing was checked, stopped by errors or not run, it is "not checked". */
export interface Standing {
  readonly verdict: Verdict;
  readonly ratio: number | null;
}

export interface Movement {
  /** The verdict that it came to; null = it is as it was. */
  readonly became: Verdict | null;
  /** Ratio after less ratio before; null where one of them has none. */
  readonly change: number | null;
}

/** A frame of one revision, as far as it is compared. */
export interface ComparedFrame extends Standing {
  /** Place in sheet order, from 0. */
  readonly index: number;
  readonly id: string;
  /** Its content: the same number in both revisions is the same frame with the same results. */
  readonly version: number | null;
  readonly status: 'stopped' | 'waiting' | 'solved' | 'not solved';
  readonly check: string | null;
  readonly subject: string | null;
  readonly section: string | null;
  readonly combination: string | null;
  readonly criticalLoadFactor: number | null;
  /** kg of one; null where it is not known. */
  readonly mass: number | null;
  readonly count: number;
}

export interface FramePair extends Movement {
  readonly id: string;
  readonly before: ComparedFrame | null;
  readonly after: ComparedFrame | null;
  /** Carried over: the same content and results, of which nothing needs to be read. */
  readonly carried: boolean;
}

/** A member of one revision, as far as it is compared. */
export interface ComparedMember extends Standing {
  readonly id: string;
  readonly role: string;
  readonly section: string;
  readonly check: string | null;
  readonly combination: string | null;
}

export interface MemberPair extends Movement {
  readonly frame: string;
  /** The frame's place in the later list (in the earlier where it is only there), from 0. */
  readonly index: number;
  readonly id: string;
  readonly before: ComparedMember | null;
  readonly after: ComparedMember | null;
}

/** A movement that any figure shows: ratios that differ by less are the same up to rounding. */
const rounding = 1e-9;

function movementOf(before: Standing | null, after: Standing | null): Movement {
  if (before === null || after === null) return { became: null, change: null };
  return {
    became: before.verdict === after.verdict ? null : after.verdict,
    change: changeOf(before.ratio, after.ratio),
  };
}

function changeOf(before: number | null, after: number | null): number | null {
  if (before === null || after === null) return null;
  if (before === after) return 0;
  const change = after - before;
  // a ratio without end (no resistance at all) is no rounding of any other
  return Number.isFinite(change) && Math.abs(change) <= rounding * Math.max(Math.abs(before), Math.abs(after)) ? 0 : change;
}

/**
 * Frames of two revisions side by side, matched by name: in the later one's sheet order, those that only the earlier one has
 * at the end.
 */
export function pairFrames(before: readonly ComparedFrame[], after: readonly ComparedFrame[]): FramePair[] {
  return paired(before, after).map(([one, two]) => {
    const id = (two ?? one)!.id;
    const carried = one !== null && two !== null && one.version !== null && one.version === two.version;
    return { id, before: one, after: two, carried, ...movementOf(one, two) };
  });
}

/**
 * Members of a frame that both revisions have. A frame without results in one of them has no members there: these are
 * not checked, and not gone.
 */
export function pairMembers(pair: FramePair, before: readonly ComparedMember[], after: readonly ComparedMember[]): MemberPair[] {
  const index = (pair.after ?? pair.before)!.index;
  const gone = (one: ComparedMember): ComparedMember => ({ ...one, verdict: 'not checked', ratio: null, check: null, combination: null }); // prettier-ignore
  const [earlier, later] = [before.length === 0 ? after.map(gone) : before, after.length === 0 ? before.map(gone) : after];
  return paired(earlier, later).map(([one, two]) => ({
    frame: pair.id,
    index,
    id: (two ?? one)!.id,
    before: one,
    after: two,
    ...movementOf(one, two),
  }));
}

function paired<T extends { readonly id: string }>(before: readonly T[], after: readonly T[]): [T | null, T | null][] {
  const left = new Map(before.map((one) => [idKey(one.id), one]));
  const pairs = after.map((two): [T | null, T | null] => {
    const key = idKey(two.id);
    const one = left.get(key) ?? null;
    left.delete(key);
    return [one, two];
  });
  return [...pairs, ...[...left.values()].map((one): [T | null, T | null] => [one, null])];
}

/** What of a list is asked for. */
export const movementKinds = ['moved', 'over', 'not-checked', 'near', 'within', 'only', 'critical', 'mass', 'all'] as const;
export type MovementKind = (typeof movementKinds)[number];

type Compared = FramePair | MemberPair;

const inOne = (pair: Compared): boolean => pair.before === null || pair.after === null;

/** True where the ratio moved by more than `by` either way. */
export const ratioMoved = ({ change }: Movement, by: number): boolean => change !== null && Math.abs(change) > by;

/** True where it moved at all: it became something else, its ratio moved by more than `by`, or only one revision has it. */
export const hasMoved = (pair: Compared, by: number): boolean => pair.became !== null || inOne(pair) || ratioMoved(pair, by);

/** @param by how much of a ratio, or of α_cr as a share of what it was, is a movement */
export function fits(pair: Compared, kind: MovementKind, by: number): boolean {
  switch (kind) {
    case 'all':
      return true;
    case 'moved':
      return hasMoved(pair, by);
    case 'only':
      return inOne(pair);
    case 'critical':
      return 'carried' in pair && criticalMoved(pair, by);
    case 'mass':
      return 'carried' in pair && massChange(pair) !== 0;
    default:
      return pair.became === (kind === 'not-checked' ? 'not checked' : kind);
  }
}

/** α_cr moved by more than a share of what it was, or is there in one of both only. */
export function criticalMoved({ before, after, carried }: FramePair, by: number): boolean {
  if (before === null || after === null || carried) return false;
  const [was, is] = [before.criticalLoadFactor, after.criticalLoadFactor];
  if (was === null || is === null) return was !== is;
  return Math.abs(is - was) > by * Math.abs(was);
}

/** Steel of a frame with its number off, kg; null where it is not known. */
export const massOf = (frame: ComparedFrame | null): number | null =>
  frame === null ? 0 : frame.mass === null ? null : frame.mass * frame.count;

/** Steel that was added, kg (negative: saved); 0 where one of both is not known. */
export function massChange({ before, after }: FramePair): number {
  const [was, is] = [massOf(before), massOf(after)];
  return was === null || is === null || Math.abs(is - was) <= rounding * Math.max(was, is) ? 0 : is - was;
}

const order: readonly (Verdict | null)[] = ['over', 'not checked', 'near', 'within', null];

/** Those that became over first, then not checked, near and within, then by how much the ratio moved; else as they came. */
export function byMovement<T extends Compared>(pairs: readonly T[]): T[] {
  const size = ({ change }: T): number => (change === null ? -1 : Math.abs(change));
  return [...pairs].sort((a, b) => order.indexOf(a.became) - order.indexOf(b.became) || size(b) - size(a));
}
