import { activityPage, askedActivity } from '@/app/_server/activity';
import { door, type Params } from '@/app/_server/door';
import { parse, queryOf } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { requireProject } from '@/app/_server/things';
import { db } from '@/db/client';
import { listActivity } from '@/db/queries/activity';
import { activityInput } from '@/lib/api/people-inputs';

/** What was done in a project, the newest first, a page at a time. */
export const GET = door(async (request, { params }: Params<'project'>) => {
  const person = await requirePerson(request, 'read activity');
  const project = await requireProject(person, (await params).project);
  const asked = askedActivity(project.id, parse(activityInput, queryOf(request)));
  const entries = await listActivity(db(), person.office, { ...asked, limit: activityPage });
  return Response.json({ entries, before: entries.length < activityPage ? null : entries.at(-1)!.id });
});
