/** What tables and filters need of each member: its extremes under every state, and the check that governs it. */
import { extremeNumbers, writeExtremes } from '@/lib/analysis/member-extremes';
import { valueAt } from '@/lib/analysis/value-at';
import { spansOf, type SpanPiece } from '@/lib/checks/spans';
import type { Frame } from '@/lib/model/frame';
import type { LineOf } from '@/lib/results/line-memo';
import type { Check, FrameEvaluation, MemberLine, Verdict } from '@/lib/results/result';
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
  /** By state of the evaluation: 14 numbers a member (lib/analysis/member-extremes.ts). */
  readonly extremes: readonly Float64Array[];
}

/** @param lineOf as used for the evaluation, so that no line is worked out twice */
export function memberResults(frame: Frame, evaluation: FrameEvaluation, lineOf: LineOf): MemberResults {
  if (evaluation.status !== 'solved') return { members: [], extremes: [] };
  const pieces = piecesOf(frame);
  const governing = byMember(frame, pieces, evaluation.checks);
  const extremes = evaluation.states.map((state) => {
    const numbers = new Float64Array(extremeNumbers * frame.members.length);
    const lines = lineOf.flat.of(state);
    for (let i = 0; i < frame.members.length; i++) {
      const at = lines.at(i);
      writeExtremes(lines.numbers, at, numbers, extremeNumbers * i);
    }
    return numbers;
  });
  const members = frame.members.map((_, i): MemberGoverning => {
    const check = governing[i]![governingIndex(governing[i]!)];
    const state = check && evaluation.states.find((each) => each.kind === 'combination' && each.name === check.combination);
    const at = check ? placeOn(check, pieces[i]!) : null;
    const forces = at !== null && state ? forcesAt(lineOf(state, i), at) : { N: null, V: null, M: null };
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

type Piece = SpanPiece & { readonly span: string | null };

/** Each member as a piece of its span, by member. */
function piecesOf(frame: Frame): Piece[] {
  const pieces: Piece[] = [];
  for (const span of spansOf(frame))
    for (const piece of span.pieces) pieces[piece.member] = { ...piece, span: span.kind === 'span' ? span.name : null };
  return pieces;
}

/** The checks of each member itself and of the span that it is a piece of, in their order. */
function byMember(frame: Frame, pieces: readonly Piece[], checks: readonly Check[]): Check[][] {
  const subjects = new Map<string, number[]>();
  frame.members.forEach((member, i) => {
    subjects.set(`member ${member.id}`, [i]);
    const { span } = pieces[i]!;
    if (span !== null) subjects.set(`span ${span}`, [...(subjects.get(`span ${span}`) ?? []), i]);
  });
  const found: Check[][] = frame.members.map(() => []);
  for (const check of checks)
    for (const i of subjects.get(`${check.subjectKind} ${check.subject ?? ''}`) ?? []) found[i]!.push(check);
  return found;
}

/** Where a check of a member or span stands on this member; null where it stands elsewhere on the span, or nowhere. */
function placeOn(check: Check, { from_m, length_m, reversed, span }: Piece): number | null {
  if (check.at === null || check.subjectKind === 'member' || span === null) return check.at;
  const along = check.at - from_m;
  const slack = 1e-9 * length_m;
  if (along < -slack || along > length_m + slack) return null;
  return reversed ? length_m - along : along;
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
    const value = extremes[i]![extremeNumbers * member + 12]!;
    if (largest === null || Math.abs(value) > Math.abs(largest)) largest = value;
  });
  return largest;
}
