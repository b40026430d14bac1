import { toCheck } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';

/** The office's revisions that are with a checker, the longest waiting first, and whether one may check each. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'read a batch');
  return Response.json({ revisions: await toCheck(person) });
});
