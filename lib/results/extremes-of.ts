import { extremeNumbers, memberExtremes, readExtremes } from '@/lib/analysis/member-extremes';
import { memberLine } from '@/lib/analysis/member-line';
import type { Frame } from '@/lib/model/frame';
import type { MemberExtremes, ResultState } from '@/lib/results/result';

/** Extremes of a member in a state: as stored with it, else recovered from its exact line; the same numbers. */
export function extremesOf(frame: Frame, state: ResultState, member: number): MemberExtremes {
  return state.extremes
    ? readExtremes(state.extremes, extremeNumbers * member)
    : memberExtremes(memberLine(frame, state, member));
}
