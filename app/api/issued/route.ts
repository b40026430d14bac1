import { door } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';
import { publicIssue } from '@/app/_server/public-issue';
import { db } from '@/db/client';
import { listIssuesFor } from '@/db/queries/issues';

/** What was issued to the client, the newest first; superseded and withdrawn ones named as such. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'read what was issued');
  return Response.json({ issues: (await listIssuesFor(db(), person.office, person.id)).map(publicIssue) });
});
