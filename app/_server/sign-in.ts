import 'server-only';
import PQueue from 'p-queue';
import { db } from '@/db/client';
import { countFailedAttempts, findAccount, insertSignInAttempt } from '@/db/queries/people';
import { insertSession } from '@/db/queries/sessions';
import { attemptRule, mustWait } from '@/lib/access/attempt-rule';
import { verifyNobody, verifyPassword } from '@/lib/access/password';
import { credentialsInput } from '@/lib/api/inputs';
import { log } from './log';

/** A working day; then the person signs in again. */
export const sessionSeconds = 10 * 3600;

/** Passwords are looked at one at a time, so that a thousand guesses sent at once are counted before they are looked at. */
export const inTurn = new PQueue({ concurrency: 1 });

/**
 * Looks at a name and password, and starts a session.
 *
 * @param address of the sender, for the limit on attempts
 * @returns the session's id; null for a wrong password, an unknown account and one without an office alike
 * @throws {Error} "wait" after too many attempts
 */
export async function signIn(sent: unknown, address: string): Promise<{ id: string } | null> {
  const read = credentialsInput.safeParse(sent);
  if (!read.success) return null;
  const { email, password } = read.data;
  return inTurn.add(async () => {
    const since = new Date(Date.now() - attemptRule.window_ms).toISOString();
    const ofAccount = await countFailedAttempts(db(), { email }, since);
    const fromAddress = await countFailedAttempts(db(), { address }, since);
    if (mustWait({ ofAccount, fromAddress })) {
      log.warn({ ofAccount, fromAddress }, 'sign-in must wait');
      throw new Error('wait');
    }
    const account = await findAccount(db(), email);
    const right = account ? await verifyPassword(account.passwordHash, password) : await verifyNobody(password);
    const office = account?.offices[0];
    const succeeded = right && account !== undefined && office !== undefined;
    await insertSignInAttempt(db(), { email, address, succeeded });
    if (!succeeded) return null;
    const expiresAt = new Date(Date.now() + sessionSeconds * 1000).toISOString();
    return { id: await insertSession(db(), { person: account.id, office: office.id, expiresAt }) };
  });
}
