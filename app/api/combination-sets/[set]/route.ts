import { door, type Params } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { insertSetVersion, listSetUses, listSetVersions, updateSetOffered } from '@/db/queries/combination-sets';
import { ApiError, notFound } from '@/lib/api/error';
import { idInput } from '@/lib/api/inputs';
import { setOfferedInput, setVersionInput } from '@/lib/api/office-inputs';
import type { Act, Person } from '@/lib/access/may';

async function at(request: Request, params: Params<'set'>['params'], act: Act) {
  const person = await requirePerson(request, act);
  const id = idInput.safeParse((await params).set);
  const versions = id.success ? await listSetVersions(db(), person.office, id.data) : [];
  const [latest] = versions;
  if (!latest) throw notFound('combination set');
  return { person, latest, versions };
}

const note = (person: Person, what: string, detail: Record<string, string | number>) =>
  insertActivity(db(), person.office, { what, person: person.id, detail });

/** One of the office's sets: every version, the latest first, and the revisions that it made. */
export const GET = door<'set'>(async (request, { params }) => {
  const { person, latest, versions } = await at(request, params, 'read combination sets');
  return Response.json({ versions, uses: await listSetUses(db(), person.office, latest.set) });
});

/** Keeps the next version of it; what earlier versions made stays as it is. */
export const POST = door<'set'>(async (request, { params }) => {
  const { person, latest } = await at(request, params, 'change combination sets');
  const given = await readJson(request, setVersionInput);
  if (!(await insertSetVersion(db(), person.office, { ...given, set: latest.set, person: person.id })))
    throw new ApiError('conflict', `The set is at version ${latest.version} by now. Open it again and change that one.`);
  const version = given.after + 1;
  await note(person, 'changed a combination set', { set: latest.name, version });
  return Response.json({ set: latest.set, version }, { status: 201 });
});

/** Offers it, or no longer. */
export const PUT = door<'set'>(async (request, { params }) => {
  const { person, latest } = await at(request, params, 'change combination sets');
  const { offered } = await readJson(request, setOfferedInput);
  await updateSetOffered(db(), person.office, latest.set, offered);
  await note(person, offered ? 'offered a combination set again' : 'took a combination set out of use', { set: latest.name });
  return Response.json({ set: latest.set, offered });
});
