/** What tables and filters need of each member: its extremes under every state, and the check that governs it. */
import { memberExtremes } from '@/lib/analysis/member-extremes';
import { valueAt } from '@/lib/analysis/value-at';
import type { Frame } from '@/lib/model/frame';
import type { Check, FrameEvaluation, MemberExtremes, MemberLine, Verdict } from '@/lib/results/result';
import type { LineOf } from '@/lib/results/line-memo';
import { governingIndex } from '@/lib/results/verdict';

/** A member's line in the members table; forces stand where its governing check does. */
export interface MemberGoverning {
  readonly check: string | null;
  readonly combination: string | null;
  /** From the member's start, m. */
  readonly at: number | null;
  readonly N: number | null;
  readonly V: number | null;
  readonly M: number | null;
  /** Largest of the service combinations, signed along local y. */
  readonly deflection: number | null;
  readonly ratio: number | null;
  readonly verdict: Verdict;
}

export interface MemberResults {
  /** By member; [] for a frame that was not solved. */
  readonly members: readonly MemberGoverning[];
  /** By state of the evaluation, then by member. */
  readonly extremes: readonly (readonly MemberExtremes[])[];
}

/** @param lineOf as used for the evaluation, so that no line is worked out twice */
export function memberResults(frame: Frame, evaluation: FrameEvaluation, lineOf: LineOf): MemberResults {
  if (evaluation.status !== 'solved') return { members: [], extremes: [] };
  const lines = evaluation.states.map((state) => frame.members.map((_, i) => lineOf(state, i)));
  const extremes = lines.map((ofState) => ofState.map((line) => memberExtremes(line)));
  const members = frame.members.map((_, i): MemberGoverning => {
    const checks = evaluation.checks.filter((check) => concerns(frame, check, i));
    const check = checks[governingIndex(checks)];
    const state = check ? evaluation.states.findIndex((each) => each.name === check.combination) : -1;
    const at = check?.subjectKind === 'member' ? check.at : null;
    const forces = at !== null && state >= 0 ? forcesAt(lines[state]![i]!, at) : { N: null, V: null, M: null };
    return {
      check: check?.check ?? null,
      combination: check?.combination ?? null,
      at,
      ...forces,
      deflection: largestDeflection(evaluation, extremes, i),
      ratio: check?.ratio ?? null,
      verdict: check?.verdict ?? 'not checked',
    };
  });
  return { members, extremes };
}

/** A check of the member itself, or of the span that it is a piece of. */
function concerns(frame: Frame, check: Check, member: number): boolean {
  if (check.subjectKind === 'member') return check.subject === frame.members[member]!.id;
  return check.subjectKind === 'span' && check.subject?.toLowerCase() === frame.members[member]!.span?.toLowerCase();
}

/** N, V, M at x; of the two sides of a jump the one with the larger moment, then the larger shear. */
function forcesAt(line: MemberLine, x: number): { N: number; V: number; M: number } {
  const place = Math.min(Math.max(x, 0), line.length);
  const [before, after] = [valueAt(line, place, 'before'), valueAt(line, place, 'after')];
  const larger = Math.abs(after.M) - Math.abs(before.M) || Math.abs(after.V) - Math.abs(before.V);
  const { N, V, M } = larger > 0 ? after : before;
  return { N, V, M };
}

function largestDeflection(evaluation: FrameEvaluation, extremes: MemberResults['extremes'], member: number): number | null {
  let largest: number | null = null;
  evaluation.states.forEach((state, i) => {
    if (state.purpose !== 'service') return;
    const { value } = extremes[i]![member]!.deflection;
    if (largest === null || Math.abs(value) > Math.abs(largest)) largest = value;
  });
  return largest;
}
