import { door, type Params } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { endToken } from '@/db/queries/tokens';
import { notFound } from '@/lib/api/error';
import { idInput } from '@/lib/api/inputs';

/** Revokes one of one’s own tokens. */
export const DELETE = door(async (request, { params }: Params<'token'>) => {
  const person = await requirePerson(request, 'be oneself');
  const id = idInput.safeParse((await params).token);
  if (!id.success || !(await endToken(db(), person.office, person.id, id.data))) throw notFound('token');
  await insertActivity(db(), person.office, { what: 'revoked a token', person: person.id, detail: { token: id.data } });
  return Response.json({ token: { id: id.data } });
});
