import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { insertToken, listTokens } from '@/db/queries/tokens';
import { ApiError } from '@/lib/api/error';
import { tokenInput } from '@/lib/api/people-inputs';

/** One’s own tokens that work; never the tokens themselves. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'be oneself');
  return Response.json({ tokens: await listTokens(db(), person.office, person.id) });
});

/** Nobody keeps track of more. */
const most = 20;

/** Makes a token and shows it, this once. */
export const POST = door(async (request) => {
  const person = await requirePerson(request, 'be oneself');
  const { name, scope, days } = await readJson(request, tokenInput);
  if ((await listTokens(db(), person.office, person.id)).length >= most) {
    throw new ApiError('conflict', `You have ${most} tokens. Revoke one that is not used any more.`);
  }
  const expiresAt = new Date(Date.now() + days * 86_400_000).toISOString();
  const { id, token } = await insertToken(db(), person.office, { person: person.id, name, scope, expiresAt });
  await insertActivity(db(), person.office, { what: 'made a token', person: person.id, detail: { name, scope, days } });
  return Response.json({ token: { id, name, scope, expiresAt, secret: token } }, { status: 201 });
});
