import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { insertPerson, listPeople } from '@/db/queries/people';
import { hashPassword } from '@/lib/access/password';
import { ApiError } from '@/lib/api/error';
import { personInput } from '@/lib/api/inputs';

/** The people of the office. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'read people');
  return Response.json({ people: await listPeople(db(), person.office) });
});

/** Adds a person with a first password, which the lead hands over. */
export const POST = door(async (request) => {
  const lead = await requirePerson(request, 'add people');
  const { name, email, role, password } = await readJson(request, personInput);
  const id = await insertPerson(db(), lead.office, { name, email, role, passwordHash: await hashPassword(password) });
  if (id === undefined) {
    const sentence = 'This address is someone’s already. Give another.';
    throw new ApiError('conflict', sentence, { fields: { email: [sentence] } });
  }
  await insertActivity(db(), lead.office, { what: 'added a person', person: lead.id, detail: { added: id, role } });
  return Response.json({ person: { id, name, email, role } }, { status: 201 });
});
