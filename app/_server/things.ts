import 'server-only';
import { db } from '@/db/client';
import { findBatch, type BatchRecord } from '@/db/queries/batches';
import { findProject, type ProjectRecord } from '@/db/queries/projects';
import { findRevision, type RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import { notFound } from '@/lib/api/error';
import { idInput, letterInput } from '@/lib/api/inputs';

/** @throws {ApiError} not-found, for another office's project as for none */
export async function requireProject(person: Person, project: string): Promise<ProjectRecord> {
  const id = idInput.safeParse(project);
  const found = id.success ? await findProject(db(), person.office, id.data) : undefined;
  if (found === undefined) throw notFound('project');
  return found;
}

/** @throws {ApiError} not-found, for another office's batch as for none */
export async function requireBatch(person: Person, batch: string): Promise<BatchRecord> {
  const id = idInput.safeParse(batch);
  const found = id.success ? await findBatch(db(), person.office, id.data) : undefined;
  if (found === undefined) throw notFound('batch');
  return found;
}

/** @throws {ApiError} not-found, for another office's revision as for none */
export async function requireRevision(person: Person, batch: string, revision: string): Promise<RevisionRecord> {
  const id = idInput.safeParse(batch);
  const letter = letterInput.safeParse(revision);
  const found = id.success && letter.success ? await findRevision(db(), person.office, id.data, letter.data) : undefined;
  if (found === undefined) throw notFound('revision');
  return found;
}
