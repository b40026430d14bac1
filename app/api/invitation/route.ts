import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { db } from '@/db/client';
import { acceptInvitation, findInvitation } from '@/db/queries/invitations';
import { hashPassword } from '@/lib/access/password';
import { ApiError } from '@/lib/api/error';
import { acceptInput } from '@/lib/api/people-inputs';

/** Whoever holds an invitation’s link becomes a person of the office, once. */
export const POST = door(async (request) => {
  const { token, name, password } = await readJson(request, acceptInput);
  const ended = 'This invitation was used, revoked or has expired. Ask the office’s lead for another.';
  // Hashing costs: not for links that do not work.
  if (!(await findInvitation(db(), token))) throw new ApiError('not-found', ended);
  const accepted = await acceptInvitation(db(), token, { name, passwordHash: await hashPassword(password) });
  if (accepted === 'ended') throw new ApiError('not-found', ended);
  if (accepted === 'taken') {
    throw new ApiError(
      'conflict',
      'Your address signs in to another office already. Ask the lead to invite another address of yours.',
    );
  }
  return Response.json({ email: accepted.email }, { status: 201 });
});
