import { door } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { listLetters } from '@/db/queries/outbox';

/** The office’s letters and how far each is; what stands in them is not told. */
export const GET = door(async (request) => {
  const lead = await requirePerson(request, 'read letters');
  return Response.json({ letters: await listLetters(db(), lead.office) });
});
