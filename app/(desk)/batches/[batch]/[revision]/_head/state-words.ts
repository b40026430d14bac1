import type { RevisionRecord } from '@/db/queries/revisions';

/** A revision's state with what qualifies it: "read: 9 problems". */
export function stateWords({ state, errors, warnings, framesStopped }: RevisionRecord): string {
  const problems = errors + warnings;
  if (state === 'read' && problems > 0) return `read: ${count(problems, 'problem')}`;
  if (state === 'run' && framesStopped > 0) return `run: ${count(framesStopped, 'frame')} stopped by errors`;
  return state;
}

const count = (n: number, noun: string): string => `${n.toLocaleString('en-GB')} ${noun}${n === 1 ? '' : 's'}`;
