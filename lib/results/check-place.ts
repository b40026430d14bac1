import type { Frame } from '@/lib/model/frame';
import type { Check } from '@/lib/results/result';

/** What a check is of, in words: "rafter BC", "node C", "between A and B", "frame". */
export function checkPlace(frame: Frame, { subjectKind, subject }: Pick<Check, 'subjectKind' | 'subject'>): string {
  if (subjectKind === 'frame' || subject === null) return 'frame';
  if (subjectKind === 'node') return `node ${subject}`;
  if (subjectKind === 'spread') return `between ${subject}`;
  const member = frame.members.find((one) => (subjectKind === 'span' ? one.span === subject : one.id === subject));
  const role = member?.role ?? null;
  return role === null || role === 'other' || subject.toLowerCase() === role ? subject : `${role} ${subject}`;
}
