import { sessionSecret } from '@/app/_server/auth';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertInvitation, listInvitations } from '@/db/queries/invitations';
import { ApiError } from '@/lib/api/error';
import { invitationInput } from '@/lib/api/people-inputs';

/** The office's open invitations. */
export const GET = door(async (request) => {
  const lead = await requirePerson(request, 'read people');
  return Response.json({ invitations: await listInvitations(db(), lead.office) });
});

const taken = {
  'of the office': 'This address is someone’s of the office already. Give another, or enable them again if they are disabled.',
  invited: 'This address is invited already. Send that invitation again, or revoke it first.',
} as const;

/** Invites someone by e-mail. */
export const POST = door(async (request) => {
  const lead = await requirePerson(request, 'add people');
  const invited = await readJson(request, invitationInput);
  const id = await insertInvitation(db(), lead.office, invited, { person: lead, serverSecret: sessionSecret() });
  if (typeof id === 'string') throw new ApiError('conflict', taken[id], { fields: { email: [taken[id]] } });
  return Response.json({ invitation: { id, ...invited } }, { status: 201 });
});
