import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { listDeclined, updateMailChoices } from '@/db/queries/mail-choices';
import { ApiError } from '@/lib/api/error';
import { lettersInput } from '@/lib/api/people-inputs';
import { choosable, mailKinds } from '@/lib/mail/kinds';
import type { MailKind } from '@/lib/mail/message';

/** Says which kinds of letters one wants; kinds that are left out stay as they were. */
export const PUT = door(async (request) => {
  const person = await requirePerson(request, 'be oneself');
  const { letters } = await readJson(request, lettersInput);
  const always = (Object.keys(letters) as MailKind[]).filter((kind) => mailKinds[kind].always);
  if (always.length > 0) throw new ApiError('bad-request', `Letters of these kinds are always sent: ${always.join(', ')}.`);
  await updateMailChoices(db(), person.office, person.id, letters);
  const declined = await listDeclined(db(), person.office, person.id);
  return Response.json({
    letters: Object.fromEntries(choosable(person.role).map((kind) => [kind, !declined.includes(kind)])),
  });
});
