import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { MailMessage } from '@/lib/mail/message';

/**
 * Puts a message to a person into the outbox, in whatever transaction the act that causes it is done in, so that
 * neither stands without the other.
 */
export async function putInOutbox(db: Db, office: number, recipient: string, message: MailMessage): Promise<void> {
  await db
    .insertInto('outbox')
    .values({ office, recipient, kind: message.kind, payload: JSON.stringify(message), state: 'waiting', created_at: instant() })
    .execute();
}
