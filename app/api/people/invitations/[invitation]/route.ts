import { sessionSecret } from '@/app/_server/auth';
import { door, type Params } from '@/app/_server/door';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { resendInvitation, revokeInvitation } from '@/db/queries/invitations';
import { notFound } from '@/lib/api/error';
import { idInput } from '@/lib/api/inputs';

function idOf(invitation: string): number {
  const id = idInput.safeParse(invitation);
  if (!id.success) throw notFound('invitation');
  return id.data;
}

/** Sends it again with a new link; the earlier link ends. */
export const POST = door(async (request, { params }: Params<'invitation'>) => {
  const lead = await requirePerson(request, 'add people');
  const id = idOf((await params).invitation);
  const sent = await resendInvitation(db(), lead.office, id, { person: lead, serverSecret: sessionSecret() });
  if (!sent) throw notFound('invitation');
  return Response.json({ invitation: { id } });
});

/** Revokes it: its link ends. */
export const DELETE = door(async (request, { params }: Params<'invitation'>) => {
  const lead = await requirePerson(request, 'add people');
  const id = idOf((await params).invitation);
  if (!(await revokeInvitation(db(), lead.office, id, lead.id))) throw notFound('invitation');
  return Response.json({ invitation: { id } });
});
