import 'server-only';
import { db } from '@/db/client';
import { listQuestions, type QuestionRecord } from '@/db/queries/issue-questions';
import { findIssue, findIssueFor, type IssueRecord } from '@/db/queries/issues';
import { findRevisionById, type RevisionRecord } from '@/db/queries/revisions';
import type { Act, Person } from '@/lib/access/may';
import { notFound } from '@/lib/api/error';
import { idInput } from '@/lib/api/inputs';
import type { Params } from './door';
import { requirePerson } from './person';

/** @throws {ApiError} not-found, for another office's issue as for none */
export async function requireIssue(person: Person, issue: string): Promise<IssueRecord> {
  const id = idInput.safeParse(issue);
  const found = id.success ? await findIssue(db(), person.office, id.data) : undefined;
  if (found === undefined) throw notFound('issue');
  return found;
}

/** An issue that was handed to this client, in a project of theirs. @throws {ApiError} not-found for all else there is */
export async function requireIssued(person: Person, issue: string): Promise<IssueRecord> {
  const id = idInput.safeParse(issue);
  const found = id.success ? await findIssueFor(db(), person.office, person.id, id.data) : undefined;
  if (found === undefined) throw notFound('issue');
  return found;
}

/** A client finds their own questions only. @throws {ApiError} not-found */
export async function requireQuestion(person: Person, issue: IssueRecord, question: string): Promise<QuestionRecord> {
  const id = idInput.safeParse(question);
  const own = person.role === 'client' ? { person: person.id } : {};
  const found = (await listQuestions(db(), issue.office, issue.id, own)).find((one) => id.success && one.id === id.data);
  if (found === undefined) throw notFound('question');
  return found;
}

export async function revisionOfIssue(issue: IssueRecord): Promise<RevisionRecord> {
  const revision = await findRevisionById(db(), issue.office, issue.revision.id);
  if (!revision) throw new Error(`Expected a revision of issue ${issue.id}`);
  return revision;
}

interface AtIssue<K extends string> {
  readonly request: Request;
  readonly person: Person;
  readonly issue: IssueRecord;
  readonly params: Readonly<Record<K | 'issue', string>>;
}

/** The first steps of every route below an issue: who, may they, and is it there for them. */
export function atIssue<K extends string = never>(act: Act, then: (at: AtIssue<K>) => Promise<Response>) {
  return async (request: Request, context: Params<K | 'issue'>): Promise<Response> => {
    const person = await requirePerson(request, act);
    const params: Record<K | 'issue', string> = await context.params;
    const find = person.role === 'client' ? requireIssued : requireIssue;
    return then({ request, person, params, issue: await find(person, params.issue) });
  };
}
