import { bringIn } from '@/app/_server/bring-in';
import { door, type Params } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';
import { requireBatch } from '@/app/_server/things';
import { readUpload } from '@/app/_server/upload';
import { db } from '@/db/client';
import { listRevisions } from '@/db/queries/revisions';
import { publicRevision } from '@/app/_server/public-revision';

/** A batch's revisions, A first. */
export const GET = door(async (request, { params }: Params<'batch'>) => {
  const person = await requirePerson(request, 'read a batch');
  const batch = await requireBatch(person, (await params).batch);
  const revisions = await listRevisions(db(), person.office, batch.id);
  return Response.json({ revisions: revisions.map(publicRevision) });
});

/** Brings mended files in as the batch's next revision. */
export const POST = door(async (request, { params }: Params<'batch'>) => {
  const person = await requirePerson(request, 'bring sheets in');
  const batch = await requireBatch(person, (await params).batch);
  const { files } = await readUpload(request);
  return Response.json(
    { batch: { id: batch.id, name: batch.name }, revision: await bringIn(person, batch, files) },
    { status: 201 },
  );
});
