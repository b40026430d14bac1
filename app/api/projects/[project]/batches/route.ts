import { bringIn } from '@/app/_server/bring-in';
import { door, type Params } from '@/app/_server/door';
import { parse } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { requireProject } from '@/app/_server/things';
import { readUpload } from '@/app/_server/upload';
import { db } from '@/db/client';
import { insertBatch, listBatches } from '@/db/queries/batches';
import { notFound } from '@/lib/api/error';
import { batchNameInput } from '@/lib/api/inputs';
import type { SentFile } from '@/lib/api/multipart';

/** A project's batches, the newest first, each by its latest revision. */
export const GET = door(async (request, { params }: Params<'project'>) => {
  const person = await requirePerson(request, 'read a batch');
  const project = await requireProject(person, (await params).project);
  return Response.json({ batches: await listBatches(db(), person.office, project.id) });
});

/** Brings files in as a new batch, whose revision A they are. */
export const POST = door(async (request, { params }: Params<'project'>) => {
  const person = await requirePerson(request, 'bring sheets in');
  const project = await requireProject(person, (await params).project);
  const { files, fields } = await readUpload(request);
  const name = parse(batchNameInput, fields.name ?? nameOf(files));
  const batch = await insertBatch(db(), person.office, { project: project.id, name, person: person.id });
  if (batch === undefined) throw notFound('project');
  const letter = await bringIn(person, { id: batch, project: project.id }, files);
  return Response.json({ batch: { id: batch, name }, revision: letter }, { status: 201 });
});

/** Files without a name for the batch lend it theirs; several are named for sheets, so it is a set of them. */
function nameOf(files: readonly SentFile[]): string {
  return files.length > 1 ? `Set of ${files.length} files` : (files[0]?.name ?? '').replace(/\.[^.]+$/, '');
}
