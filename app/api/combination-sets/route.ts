import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { insertCombinationSet, listCombinationSets } from '@/db/queries/combination-sets';
import { ApiError } from '@/lib/api/error';
import { newSetInput } from '@/lib/api/office-inputs';

/** The office's own combination sets, each in its latest version. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'read combination sets');
  return Response.json({ sets: await listCombinationSets(db(), person.office) });
});

/** Keeps a new set, as its version 1. */
export const POST = door(async (request) => {
  const person = await requirePerson(request, 'change combination sets');
  const given = await readJson(request, newSetInput);
  const set = await insertCombinationSet(db(), person.office, { ...given, person: person.id });
  if (set === undefined) {
    const sentence = `The office has a set named ${given.name} already. Change that one, or give this one another name.`;
    throw new ApiError('conflict', sentence, { fields: { name: [sentence] } });
  }
  const detail = { set: given.name, version: 1 };
  await insertActivity(db(), person.office, { what: 'kept a combination set', person: person.id, detail });
  return Response.json({ set, version: 1 }, { status: 201 });
});
