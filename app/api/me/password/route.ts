import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson, sessionOf } from '@/app/_server/person';
import { senderOf } from '@/app/_server/sender';
import { inTurn } from '@/app/_server/sign-in';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { endLinks } from '@/db/queries/links';
import { countFailedAttempts, findAccount, insertSignInAttempt } from '@/db/queries/people';
import { endSessions, updatePassword } from '@/db/queries/standing';
import type { Person } from '@/lib/access/may';
import { attemptRule, mustWait } from '@/lib/access/attempt-rule';
import { hashPassword, verifyPassword } from '@/lib/access/password';
import { ApiError } from '@/lib/api/error';
import { ownPasswordInput } from '@/lib/api/people-inputs';

/** Changes one’s own password; every other session ends, and every link to choose another by. A wrong present password counts as a failed sign-in. */
export const PUT = door(async (request) => {
  const person = await requirePerson(request, 'be oneself');
  const { current, password } = await readJson(request, ownPasswordInput);
  await inTurn.add(() => verifyOwn(person, current, senderOf(request.headers)));
  const hash = await hashPassword(password);
  const session = await sessionOf(request);
  await db()
    .transaction()
    .execute(async (within) => {
      await updatePassword(within, person.id, hash);
      await endSessions(within, person.id, session);
      await endLinks(within, { person: person.id });
      await insertActivity(within, person.office, { what: 'changed their password', person: person.id });
    });
  return Response.json({ changed: true });
});

/** @throws {ApiError} too-many after too many failures; bad-request for a password that is not theirs, which is counted */
async function verifyOwn({ email }: Person, current: string, address: string): Promise<void> {
  const since = new Date(Date.now() - attemptRule.window_ms).toISOString();
  const ofAccount = await countFailedAttempts(db(), { email }, since);
  const fromAddress = await countFailedAttempts(db(), { address }, since);
  if (mustWait({ ofAccount, fromAddress })) {
    throw new ApiError('too-many', 'There were too many attempts. Wait a quarter of an hour, then try again.');
  }
  const account = await findAccount(db(), email);
  if (account && (await verifyPassword(account.passwordHash, current))) return;
  await insertSignInAttempt(db(), { email, address, succeeded: false });
  const sentence = 'This is not the password you have now.';
  throw new ApiError('bad-request', sentence, { fields: { current: [sentence] } });
}
