import { door, type Params } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';
import { requireBatch } from '@/app/_server/things';

/** A batch of the office. */
export const GET = door(async (request, { params }: Params<'batch'>) => {
  const person = await requirePerson(request, 'read a batch');
  return Response.json({ batch: await requireBatch(person, (await params).batch) });
});
