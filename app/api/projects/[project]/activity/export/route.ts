import { activityCsv, askedActivity } from '@/app/_server/activity';
import { door, type Params } from '@/app/_server/door';
import { attachment, bodyOf } from '@/app/_server/download';
import { parse, queryOf } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { requireProject } from '@/app/_server/things';
import { activityInput } from '@/lib/api/people-inputs';

/** What was done in a project as CSV: every entry that the filters leave. */
export const GET = door(async (request, { params }: Params<'project'>) => {
  const person = await requirePerson(request, 'read activity');
  const project = await requireProject(person, (await params).project);
  const asked = askedActivity(project.id, parse(activityInput, queryOf(request)));
  return attachment(`Activity of ${project.name}.csv`, bodyOf(activityCsv(person.office, asked)));
});
