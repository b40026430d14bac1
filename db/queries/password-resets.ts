import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { findAccount } from './people';
import { insertActivity } from './activity';
import { endLinks, findLink, insertLink, useLink } from './links';
import { putInOutbox } from './outbox';
import { endSessions, updatePassword } from './standing';
import { endTokens } from './tokens';

/** How often a new password was asked for: for an account, or from an address, since an instant. */
export async function countResetRequests(
  db: Db,
  by: { readonly email: string } | { readonly address: string },
  since: string,
): Promise<number> {
  const query = db
    .selectFrom('reset_request')
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .where('at', '>=', since);
  const one = 'email' in by ? query.where('email', '=', by.email) : query.where('address', '=', by.address);
  return (await one.executeTakeFirstOrThrow()).n;
}

/** Notes that someone asked. Whether there is such a person is looked up later, so that the answer takes as long for everyone. */
export async function insertResetRequest(db: Db, { email, address }: { readonly email: string; readonly address: string }) {
  await db.insertInto('reset_request').values({ email, address, at: instant(), done_at: null }).execute();
}

/** Puts a letter with a new link into the outbox for everyone who asked and has an account that may sign in. */
export async function answerResetRequests(db: Db, serverSecret: string): Promise<void> {
  const asked = await db.selectFrom('reset_request').select(['id', 'email']).where('done_at', 'is', null).orderBy('id').execute();
  for (const { id, email } of asked) {
    await db.transaction().execute(async (within) => {
      const { numUpdatedRows } = await within
        .updateTable('reset_request')
        .set({ done_at: instant() })
        .where('id', '=', id)
        .where('done_at', 'is', null)
        .executeTakeFirst();
      const account = numUpdatedRows > 0n ? await findAccount(within, email) : undefined;
      const office = account?.offices[0];
      if (!account || !office) return;
      const link = await insertLink(within, office.id, { person: account.id }, serverSecret);
      await putInOutbox(within, office.id, account.email, { kind: 'password reset', link });
    });
  }
}

/** Whether the holder of a secret may choose a new password by it. */
export async function isResetOpen(db: Db, secret: string): Promise<boolean> {
  return (await findLink(db, 'password reset', secret)) !== undefined;
}

/**
 * Sets the password of whoever holds a link's secret, once, and ends everything they are signed in by.
 *
 * @returns false for a link that does not work (any more)
 */
export async function resetPassword(db: Db, secret: string, passwordHash: string): Promise<boolean> {
  return db.transaction().execute(async (within) => {
    const link = await findLink(within, 'password reset', secret);
    if (!link || link.person === null || !(await useLink(within, link.id))) return false;
    const { person, office } = link;
    await updatePassword(within, person, passwordHash);
    await endSessions(within, person);
    await endTokens(within, person);
    await endLinks(within, { person });
    await insertActivity(within, office, { what: 'set a new password by e-mail', person });
    return true;
  });
}
