/** Who may check a revision: a second engineer, never one who had a hand in it. */

/** What makes a person part of a revision's making, frames carried over from earlier revisions included. */
export type Deed = 'uploaded' | 'changed' | 'ran' | 'made' | 'sent';

/** A person with what they did of a revision. */
export interface Work {
  readonly id: number;
  readonly name: string;
  readonly did: readonly Deed[];
}

const words: Readonly<Record<Deed, string>> = {
  uploaded: 'uploaded frames of it',
  changed: 'changed frames of it',
  ran: 'ran frames of it',
  made: 'made this revision',
  sent: 'sent it to check',
};

/** "uploaded and ran frames of it": what a person did of a revision, in words. */
export function deedWords(did: readonly Deed[]): string {
  const hands = (['uploaded', 'changed', 'ran'] as const).filter((deed) => did.includes(deed));
  const ofFrames = hands.length === 0 ? [] : [`${listed(hands)} frames of it`];
  return listed([...ofFrames, ...(['made', 'sent'] as const).filter((deed) => did.includes(deed)).map((deed) => words[deed])]);
}

function listed(items: readonly string[]): string {
  return items.length < 2 ? (items[0] ?? '') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`;
}

/** True for who has done nothing of the revision. */
export function isIndependent(person: number, work: readonly Work[]): boolean {
  return !work.some(({ id, did }) => id === person && did.length > 0);
}

/**
 * Why a person may not check a revision; null = they may. The rule binds the lead as anyone.
 *
 * @param work everyone's part in the revision, frames that were carried over included
 */
export function whyNotCheck(person: { readonly id: number; readonly role: string }, work: readonly Work[]): string | null {
  if (person.role !== 'checker' && person.role !== 'lead') return 'A checker or the lead checks a revision.';
  const own = work.find(({ id }) => id === person.id);
  if (own === undefined || own.did.length === 0) return null;
  return `You ${deedWords(own.did)}, so someone else has to check it. This binds the lead as well.`;
}
