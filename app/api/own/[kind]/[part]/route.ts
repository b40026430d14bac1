import { door, type Params } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { keepOwn, ownWords, requireOwnKind, requireOwnPart } from '@/app/_server/own-parts';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { listOwnUses, listOwnVersions, retireOwnPart } from '@/db/queries/own-parts';
import { ApiError } from '@/lib/api/error';
import { ownVersionInput } from '@/lib/api/own-inputs';

/** One of the office's own, with every version and where each is used. */
export const GET = door(async (request, { params }: Params<'kind' | 'part'>) => {
  const person = await requirePerson(request, 'read sections');
  const { kind, part } = await params;
  const found = await requireOwnPart(person, requireOwnKind(kind), part);
  const [versions, uses] = await Promise.all([
    listOwnVersions(db(), person.office, found.id),
    listOwnUses(db(), person.office, found.id),
  ]);
  return Response.json({ part: found, versions, uses });
});

/** Its next version; what was read with an earlier one stays as it is. Of a retired one: it is offered again. */
export const PUT = door(async (request, { params }: Params<'kind' | 'part'>) => {
  const person = await requirePerson(request, 'change sections');
  const { kind, part } = await params;
  const found = await requireOwnPart(person, requireOwnKind(kind), part);
  const { note, ...record } = await readJson(request, ownVersionInput);
  return Response.json(await keepOwn(person, found.kind, { ...record, name: found.name }, { note, edits: found.name }));
});

/** Takes it from what is offered. */
export const DELETE = door(async (request, { params }: Params<'kind' | 'part'>) => {
  const person = await requirePerson(request, 'change sections');
  const { kind, part } = await params;
  const { id, name, kind: of } = await requireOwnPart(person, requireOwnKind(kind), part);
  if (!(await retireOwnPart(db(), person.office, of, id, person.id)))
    throw new ApiError('conflict', `${name} is no longer offered already.`);
  const detail = { [ownWords[of]]: name };
  await insertActivity(db(), person.office, {
    what: `retired one of the office’s own ${ownWords[of]}s`,
    person: person.id,
    detail,
  });
  return Response.json({ retired: true });
});
