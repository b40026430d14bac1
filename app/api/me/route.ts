import { door } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { listDeclined } from '@/db/queries/mail-choices';
import { choosable } from '@/lib/mail/kinds';

/** Who one is, and which letters one gets. */
export const GET = door(async (request) => {
  const { id, name, email, role, office, officeName } = await requirePerson(request, 'be oneself');
  const declined = await listDeclined(db(), office, id);
  const letters = Object.fromEntries(choosable(role).map((kind) => [kind, !declined.includes(kind)]));
  return Response.json({ person: { id, name, email, role, officeName }, letters });
});
