import 'server-only';
import { db, raw } from '@/db/client';
import { findIssueBasis, type IssueBasis } from '@/db/queries/issue-basis';
import { bytesMade } from '@/db/queries/issue-files';
import { findIssueOfRevision } from '@/db/queries/issues';
import { findLatestJob } from '@/db/queries/jobs';
import { listPeople } from '@/db/queries/people';
import { listAssigned } from '@/db/queries/projects';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import { notFound } from '@/lib/api/error';
import type { IssueState } from '@/lib/issuing/issue-states';
import { whyNot } from '@/worker/ask-issue';

/** How far the making of an issue's files is. */
export interface MakingProgress {
  readonly issue: number;
  readonly number: string;
  readonly state: IssueState;
  readonly failure: string | null;
  readonly files: { readonly done: number; readonly of: number };
  readonly bytes: number;
}

/** The issue of a revision that is being made, was made or could not be; null where none was asked for. */
export async function makingOf({ office, id }: RevisionRecord): Promise<MakingProgress | null> {
  const issue = await findIssueOfRevision(db(), office, id);
  if (!issue) return null;
  const job = await findLatestJob(db(), office, id, 'issue');
  return {
    issue: issue.id,
    number: issue.number,
    state: issue.state,
    failure: issue.failure,
    files: { done: job?.done ?? 0, of: job?.total ?? 0 },
    bytes: issue.state === 'making' ? bytesMade(raw(), issue.id) : 0,
  };
}

export interface Preparing {
  readonly basis: IssueBasis;
  /** Why this person may not issue it now; [] = they may. */
  readonly why: readonly string[];
  /** Clients of the project; `holds`: has the issue that this one would take the place of, and gets this one too. */
  readonly clients: readonly { readonly id: number; readonly name: string; readonly email: string; readonly holds: boolean }[];
}

export async function preparingOf(person: Person, revision: RevisionRecord): Promise<Preparing> {
  const basis = await findIssueBasis(db(), revision.office, revision.id);
  if (!basis) throw notFound('revision');
  return { basis, why: whyNot(basis, person), clients: await clientsOf(revision.office, revision.project, basis) };
}

/** The project's people whose role is client: nobody else gets an issue. */
export async function clientsOf(office: number, project: number, basis: Pick<IssueBasis, 'before'> | null) {
  const people = await listPeople(db(), office);
  const assigned = new Set((await listAssigned(db(), office, project)).map((one) => one.id));
  const holds = new Set(basis?.before?.clients ?? []);
  return people
    .filter(({ id, role }) => role === 'client' && assigned.has(id))
    .map(({ id, name, email }) => ({ id, name, email, holds: holds.has(id) }));
}
