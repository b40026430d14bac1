/** Whether an engine gives what was issued: a frame's stored results against the same frame evaluated now. */
import type { Check, FrameEvaluation, ResultState, Verdict } from '@/lib/results/result';

export interface AlteredFrame {
  /** In sheet order, from 1. */
  readonly number: number;
  readonly frame: string;
  readonly before: { readonly verdict: Verdict; readonly ratio: number | null };
  readonly now: { readonly verdict: Verdict; readonly ratio: number | null };
  /** What differs, in words: "verdict", "ratio of sway at C", "forces of C3". */
  readonly what: string;
  /** Largest difference of a ratio, and of a movement, reaction or force as a share of the largest of its kind. */
  readonly ratioBy: number;
  readonly forceBy: number;
}

/** A share by which the order of additions may differ and nothing else: below it a number is the same. */
const sameWithin = 1e-9;

/** @returns null where every verdict, ratio, movement, reaction and force is as it was stored */
export function alteredFrame(
  of: { readonly number: number; readonly frame: string },
  before: FrameEvaluation,
  now: FrameEvaluation,
): AlteredFrame | null {
  const differences: string[] = [];
  if (before.status !== now.status)
    differences.push(now.status === 'solved' ? 'it has a solution now' : 'it has no solution now');
  if (before.verdict !== now.verdict) differences.push('verdict');
  const checks = checkDifference(before.checks, now.checks);
  const states = stateDifference(before.states, now.states);
  if (checks.by > sameWithin) differences.push(checks.what);
  if (states.by > sameWithin) differences.push(states.what);
  if (differences.length === 0) return null;
  const standing = ({ verdict, governing }: FrameEvaluation) => ({ verdict, ratio: governing?.ratio ?? null });
  return {
    ...of,
    before: standing(before),
    now: standing(now),
    what: differences.join(', '),
    ratioBy: checks.by,
    forceBy: states.by,
  };
}

interface Difference {
  readonly by: number;
  readonly what: string;
}
const none: Difference = { by: 0, what: '' };
const larger = (a: Difference, b: Difference): Difference => (b.by > a.by ? b : a);

/** Checks are matched by subject and name: one that is there in one of both only is a difference without end. */
function checkDifference(before: readonly Check[], now: readonly Check[]): Difference {
  const key = ({ subject, check }: Check): string => JSON.stringify([subject, check]);
  const left = new Map(before.map((check) => [key(check), check]));
  let most = none;
  for (const check of now) {
    const was = left.get(key(check));
    left.delete(key(check));
    const where = `${check.check}${check.subject === null ? '' : ` at ${check.subject}`}`;
    if (!was) most = larger(most, { by: Infinity, what: `${where} is new` });
    else if (was.verdict !== check.verdict) most = larger(most, { by: Infinity, what: `verdict of ${where}` });
    else most = larger(most, { by: apart(was.ratio, check.ratio), what: `ratio of ${where}` });
  }
  for (const { check, subject } of left.values())
    most = larger(most, { by: Infinity, what: `${check}${subject === null ? '' : ` at ${subject}`} is gone` });
  return most;
}

function apart(was: number | null, is: number | null): number {
  if (was === is) return 0;
  if (was === null || is === null) return Infinity;
  const by = Math.abs(is - was);
  return Number.isNaN(by) ? Infinity : by;
}

function stateDifference(before: readonly ResultState[], now: readonly ResultState[]): Difference {
  const left = new Map(before.map((state) => [state.name, state]));
  let most = none;
  for (const state of now) {
    const was = left.get(state.name);
    left.delete(state.name);
    if (!was) {
      most = larger(most, { by: Infinity, what: `${state.name} is new` });
      continue;
    }
    for (const [kind, what] of kinds)
      most = larger(most, { by: share(was[kind], state[kind]), what: `${what} of ${state.name}` });
    const alpha = [was.criticalLoadFactor, state.criticalLoadFactor] as const;
    const by = apart(...alpha) / Math.max(1, Math.abs(alpha[0] ?? 1));
    most = larger(most, { by, what: `α_cr of ${state.name}` });
  }
  for (const name of left.keys()) most = larger(most, { by: Infinity, what: `${name} is gone` });
  return most;
}

const kinds = [
  ['displacements', 'movements'],
  ['reactions', 'reactions'],
  ['endForces', 'forces'],
] as const;

/** Largest difference of two lists as a share of the largest number in them. */
function share(was: Float64Array, is: Float64Array): number {
  if (was.length !== is.length) return Infinity;
  let most = 0;
  let size = 0;
  for (let i = 0; i < was.length; i++) {
    const [a, b] = [was[i]!, is[i]!];
    // a node without a rotation of its own has none in either
    if (Number.isNaN(a) && Number.isNaN(b)) continue;
    if (Number.isNaN(a) !== Number.isNaN(b)) return Infinity;
    most = Math.max(most, Math.abs(a - b));
    size = Math.max(size, Math.abs(a), Math.abs(b));
  }
  return size === 0 ? 0 : most / size;
}
