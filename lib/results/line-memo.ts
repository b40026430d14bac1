import { lineFrom } from '@/lib/analysis/flat-line';
import { FlatLines } from '@/lib/analysis/flat-lines';
import type { Frame } from '@/lib/model/frame';
import type { MemberLine, ResultState } from '@/lib/results/result';

export interface LineOf {
  (state: ResultState, member: number): MemberLine;
  /** The same lines as rows of numbers, for what goes through thousands of them. */
  readonly flat: FlatLines;
}

/** Exact lines of a frame's members, each worked out once, for as long as this function is kept. */
export function lineMemo(frame: Frame): LineOf {
  const flat = new FlatLines(frame);
  const known = new Map<ResultState, MemberLine[]>();
  const lineOf = (state: ResultState, member: number): MemberLine => {
    let lines = known.get(state);
    if (!lines) known.set(state, (lines = []));
    return (lines[member] ??= objectOf(flat, state, member));
  };
  return Object.assign(lineOf, { flat });
}

function objectOf(flat: FlatLines, state: ResultState, member: number): MemberLine {
  const lines = flat.of(state);
  const at = lines.at(member);
  return lineFrom(lines.numbers, at);
}
