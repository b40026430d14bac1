import { door, type Params } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { requireProject } from '@/app/_server/things';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { listAssigned, updateAssigned } from '@/db/queries/projects';
import { assignedInput } from '@/lib/api/inputs';

/** Who is assigned to a project. */
export const GET = door(async (request, { params }: Params<'project'>) => {
  const person = await requirePerson(request, 'assign people');
  const project = await requireProject(person, (await params).project);
  return Response.json({ people: await listAssigned(db(), person.office, project.id) });
});

/** Makes these people, and no others, the ones assigned. */
export const PUT = door(async (request, { params }: Params<'project'>) => {
  const person = await requirePerson(request, 'assign people');
  const project = await requireProject(person, (await params).project);
  const { people } = await readJson(request, assignedInput);
  await updateAssigned(db(), person.office, project.id, people);
  await insertActivity(db(), person.office, { what: 'assigned people', project: project.id, person: person.id });
  return Response.json({ people: await listAssigned(db(), person.office, project.id) });
});
