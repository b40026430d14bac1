import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { insertProject, listProjects } from '@/db/queries/projects';
import { ApiError } from '@/lib/api/error';
import { projectInput } from '@/lib/api/inputs';

/** The office's projects, the last changed first. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'read projects');
  return Response.json({ projects: await listProjects(db(), person.office) });
});

/** Adds a project. */
export const POST = door(async (request) => {
  const person = await requirePerson(request, 'add a project');
  const { name, number } = await readJson(request, projectInput);
  const id = await insertProject(db(), person.office, { name, number: number === '' ? null : number, person: person.id });
  if (id === undefined) {
    const sentence = `The office has a project “${name}” already. Give this one another name.`;
    throw new ApiError('conflict', sentence, { fields: { name: [sentence] } });
  }
  await insertActivity(db(), person.office, { what: 'added a project', project: id, person: person.id });
  return Response.json({ project: { id, name } }, { status: 201 });
});
