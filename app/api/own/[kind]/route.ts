import { door, type Params } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { keepOwn, requireOwnKind } from '@/app/_server/own-parts';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { listOwnParts } from '@/db/queries/own-parts';
import { ownInput } from '@/lib/api/own-inputs';

/** The office's own sections or grades, each by its latest version. */
export const GET = door(async (request, { params }: Params<'kind'>) => {
  const person = await requirePerson(request, 'read sections');
  const kind = requireOwnKind((await params).kind);
  return Response.json({ parts: await listOwnParts(db(), person.office, kind) });
});

/** A new one: its first version. */
export const POST = door(async (request, { params }: Params<'kind'>) => {
  const person = await requirePerson(request, 'change sections');
  const kind = requireOwnKind((await params).kind);
  const { note, ...record } = await readJson(request, ownInput);
  return Response.json(await keepOwn(person, kind, record, { note, edits: null }), { status: 201 });
});
