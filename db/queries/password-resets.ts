import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { findAccount } from './people';
import { insertLink } from './links';
import { putInOutbox } from './outbox';

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
