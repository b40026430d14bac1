/** The part of a revision's life that belongs to checking, in one table. Issuing goes on from "checked" (lib/issuing). */
const moves = {
  send: { from: ['run', 'stopped', 'returned'], to: 'to check' },
  return: { from: ['to check', 'checked'], to: 'returned' },
  pass: { from: ['to check'], to: 'checked' },
} as const;

export type CheckingAct = keyof typeof moves;
export type CheckingState = (typeof moves)[CheckingAct]['from'][number];

/** States in which a revision's input, results and marks stay as they are: it is not run, changed in place or read again. */
const frozen: readonly string[] = ['to check', 'checked', 'issued', 'superseded', 'withdrawn'];
export const isFrozen = (state: string): boolean => frozen.includes(state);

/** The states that an act leads from, and the one it leads to. */
export const moveOf = (act: CheckingAct): { readonly from: readonly CheckingState[]; readonly to: CheckingState } => moves[act];

/** Frames are marked, queried and accepted only while a checker has the revision. */
export const canBeMarked = (state: string): boolean => state === 'to check';

/** Queries are answered and closed as long as nobody relies on the revision: with the checker, or returned. */
export const canBeAnswered = (state: string): boolean => state === 'to check' || state === 'returned';

/** Why an act cannot be done to a revision in a state, in a sentence; null = it can. */
export function whyNotMove(state: string, act: CheckingAct): string | null {
  const { from }: { from: readonly string[] } = moves[act];
  if (from.includes(state)) return null;
  if (act === 'send') return whyNotSend(state);
  if (act === 'return' && isFrozen(state)) return `A revision that is ${state} isn’t returned: withdraw its issue instead.`;
  if (state === 'checked') return 'This revision was passed already.';
  return `Only a revision that was sent to check is ${act === 'return' ? 'returned' : 'passed'}; this one is ${state}.`;
}

function whyNotSend(state: string): string {
  if (state === 'to check') return 'This revision is with the checker already.';
  if (isFrozen(state)) return `This revision is ${state} already.`;
  if (state === 'reading' || state === 'running') return `This revision is still ${state}. Send it when that has ended.`;
  return 'Nothing of this revision has been run yet. Run it first.';
}
