/** The states of an issue and of its revision from "checked" on: one table, and nothing moves but by it. */

/** making: its files are being written, nobody but the office sees it. failed: they could not be; it may be begun anew. */
export const issueStates = ['making', 'failed', 'issued', 'superseded', 'withdrawn'] as const;
export type IssueState = (typeof issueStates)[number];

/** What is done to an issue. */
export type IssueAct = 'give up making' | 'hand over' | 'supersede' | 'withdraw';

interface Move {
  readonly from: readonly IssueState[];
  readonly to: IssueState;
  /** Its revision moves with it, in the same transaction; null = it stays. */
  readonly revision: { readonly from: readonly RevisionFrom[]; readonly to: 'issued' | 'superseded' | 'withdrawn' } | null;
}
type RevisionFrom = 'checked' | 'issued' | 'superseded';

export const issueMoves: Readonly<Record<IssueAct, Move>> = {
  'give up making': { from: ['making'], to: 'failed', revision: null },
  'hand over': { from: ['making'], to: 'issued', revision: { from: ['checked'], to: 'issued' } },
  supersede: { from: ['issued'], to: 'superseded', revision: { from: ['issued'], to: 'superseded' } },
  // An error may come to light after a later issue took its place: whoever built from it must still hear of it.
  withdraw: { from: ['issued', 'superseded'], to: 'withdrawn', revision: { from: ['issued', 'superseded'], to: 'withdrawn' } },
};

/** The state that an act leads to; null where it is not to be done to an issue in this state. */
export function afterAct(state: IssueState, act: IssueAct): IssueState | null {
  const move = issueMoves[act];
  return move.from.includes(state) ? move.to : null;
}

/** Whether it was handed to clients once, whatever became of it. */
export const wasHandedOver = (state: IssueState): boolean =>
  state === 'issued' || state === 'superseded' || state === 'withdrawn';
