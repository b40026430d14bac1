import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { listOfficeLimits, updateOfficeLimits } from '@/db/queries/office-limits';
import { limitsInput } from '@/lib/api/office-inputs';

/** The office's own limits on movement. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'read limits');
  return Response.json({ limits: await listOfficeLimits(db(), person.office) });
});

/** Puts these in place of the office's limits; revisions read from then on take them. */
export const PUT = door(async (request) => {
  const person = await requirePerson(request, 'change limits');
  const { limits } = await readJson(request, limitsInput);
  await updateOfficeLimits(db(), person.office, { person: person.id, limits });
  await insertActivity(db(), person.office, {
    what: 'changed the office’s limits',
    person: person.id,
    detail: { limits: limits.length },
  });
  return Response.json({ limits: await listOfficeLimits(db(), person.office) });
});
