import { door, type Params } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { updateLetterAgain } from '@/db/queries/outbox';
import { notFound } from '@/lib/api/error';
import { idInput } from '@/lib/api/inputs';

/** Tries a letter that failed once more, from the beginning. */
export const POST = door(async (request, { params }: Params<'letter'>) => {
  const lead = await requirePerson(request, 'read letters');
  const id = idInput.safeParse((await params).letter);
  if (!id.success || !(await updateLetterAgain(db(), lead.office, id.data))) throw notFound('failed letter');
  await insertActivity(db(), lead.office, { what: 'tried a letter again', person: lead.id, detail: { letter: id.data } });
  return Response.json({ letter: { id: id.data } });
});
