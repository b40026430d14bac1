import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { senderOf } from '@/app/_server/sender';
import { db } from '@/db/client';
import { countResetRequests, insertResetRequest, isResetOpen, resetPassword } from '@/db/queries/password-resets';
import { resetRule } from '@/lib/access/attempt-rule';
import { hashPassword } from '@/lib/access/password';
import { ApiError } from '@/lib/api/error';
import { askResetInput, resetInput } from '@/lib/api/people-inputs';

/** Asks for a link to choose a new password by. The answer is the same, and takes as long, whoever the address belongs to. */
export const POST = door(async (request) => {
  const { email } = await readJson(request, askResetInput);
  const address = senderOf(request.headers);
  const since = new Date(Date.now() - resetRule.window_ms).toISOString();
  const ofAccount = await countResetRequests(db(), { email }, since);
  const fromAddress = await countResetRequests(db(), { address }, since);
  if (ofAccount >= resetRule.perAccount || fromAddress >= resetRule.perAddress) {
    throw new ApiError('too-many', 'A new password was asked for too often. Wait an hour, then try again.');
  }
  await insertResetRequest(db(), { email, address });
  return Response.json({ asked: true }, { status: 202 });
});

/** Sets the password of whoever holds the link, once. */
export const PUT = door(async (request) => {
  const { token, password } = await readJson(request, resetInput);
  const ended = new ApiError('not-found', 'This link was used or has expired. Ask for another from the sign-in page.');
  // Hashing costs: not for links that do not work.
  if (!(await isResetOpen(db(), token))) throw ended;
  if (!(await resetPassword(db(), token, await hashPassword(password)))) throw ended;
  return Response.json({ changed: true });
});
