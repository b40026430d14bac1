import { memberLine } from '@/lib/analysis/member-line';
import type { Frame } from '@/lib/model/frame';
import type { MemberLine, ResultState } from '@/lib/results/result';

export type LineOf = (state: ResultState, member: number) => MemberLine;

/** Exact lines of a frame's members, each worked out once, for as long as this function is kept. */
export function lineMemo(frame: Frame): LineOf {
  const known = new Map<ResultState, MemberLine[]>();
  return (state, member) => {
    let lines = known.get(state);
    if (!lines) known.set(state, (lines = []));
    return (lines[member] ??= memberLine(frame, state, member));
  };
}
