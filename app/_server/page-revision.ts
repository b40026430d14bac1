import 'server-only';
import { redirect } from 'next/navigation';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import { requirePagePerson } from './page-person';
import { pageThing } from './page-thing';
import { requireRevision } from './things';

export interface RevisionParams {
  readonly batch: string;
  readonly revision: string;
}

/** Who looks at a page of a revision, and the revision; signed out, foreign and missing as everywhere. */
export async function pageRevision(
  params: Promise<RevisionParams>,
  sheet: string,
): Promise<{ person: Person; revision: RevisionRecord }> {
  const { batch, revision: letter } = await params;
  const person = await requirePagePerson('read a batch', `/batches/${batch}/${letter}/${sheet}`);
  const revision = await pageThing(requireRevision(person, batch, letter));
  return { person, revision };
}

/** Results exist once a run was begun; before that a page of results sends on to what there is. */
export function needResults(revision: RevisionRecord): void {
  const { batch, letter, state } = revision;
  if (state === 'reading' || state === 'read' || (state === 'failed' && revision.runStartedAt === null)) {
    redirect(`/batches/${batch}/${letter}/read`);
  }
}
