import { door, type Params } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';
import { requireProject } from '@/app/_server/things';

/** A project of the office. */
export const GET = door(async (request, { params }: Params<'project'>) => {
  const person = await requirePerson(request, 'read projects');
  return Response.json({ project: await requireProject(person, (await params).project) });
});
