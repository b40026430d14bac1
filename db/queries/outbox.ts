import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { mailKinds } from '@/lib/mail/kinds';
import type { MailKind, MailMessage } from '@/lib/mail/message';

/** A letter that one attempt has in hand. */
export interface LetterInHand {
  readonly id: number;
  readonly office: number;
  readonly officeName: string;
  readonly recipient: string;
  readonly message: MailMessage;
  readonly idempotencyKey: string;
  /** This one included. */
  readonly attempts: number;
}

export interface LetterListed {
  readonly id: number;
  readonly recipient: string;
  readonly kind: MailKind;
  readonly state: 'waiting' | 'sent' | 'failed';
  readonly attempts: number;
  readonly lastError: string | null;
  readonly createdAt: string;
  readonly sentAt: string | null;
}

/** An attempt that has said nothing for so long is taken to have died with its process. */
const attempt_ms = 60_000;

/**
 * Puts a message to a person into the outbox, in whatever transaction the act that causes it is done in, so that
 * neither stands without the other. Someone who declined the kind, or is no longer of the office, gets none of it.
 *
 * @returns whether a letter will go out
 */
export async function putInOutbox(db: Db, office: number, recipient: string, message: MailMessage): Promise<boolean> {
  const email = recipient.trim();
  if (!(await mayReach(db, office, email, message.kind))) return false;
  const at = instant();
  await db
    .insertInto('outbox')
    .values({
      office,
      recipient: email,
      kind: message.kind,
      payload: JSON.stringify(message),
      state: 'waiting',
      idempotency_key: `tallyframe-${randomUUID()}`,
      due_at: at,
      created_at: at,
    })
    .execute();
  return true;
}

/** Whether letters of a kind go to someone as things stand: asked when one is written, and again when it is sent. */
export async function mayReach(db: Db, office: number, email: string, kind: MailKind): Promise<boolean> {
  if (mailKinds[kind].always) return true;
  const found = await db
    .selectFrom('membership')
    .innerJoin('person', 'person.id', 'membership.person')
    .leftJoin('mail_choice', (join) =>
      join
        .onRef('mail_choice.office', '=', 'membership.office')
        .onRef('mail_choice.person', '=', 'membership.person')
        .on('mail_choice.kind', '=', kind),
    )
    .select('mail_choice.wanted')
    .where('membership.office', '=', office)
    .where('membership.ended_at', 'is', null)
    .where('person.email', '=', email)
    .executeTakeFirst();
  return found !== undefined && found.wanted !== 0;
}

/**
 * Takes the letter longest due in hand: in one statement, so that no two processes have the same. It is due again
 * after a minute, unless its attempt says before how it ended.
 */
export async function takeDueLetter(db: Db, now: Date = new Date()): Promise<LetterInHand | undefined> {
  const row = await db
    .updateTable('outbox')
    .set({ attempts: sql<number>`attempts + 1`, due_at: new Date(now.getTime() + attempt_ms).toISOString() })
    .where('id', '=', (eb) =>
      eb
        .selectFrom('outbox as due')
        .select('due.id')
        .where('due.state', '=', 'waiting')
        .where('due.due_at', '<=', now.toISOString())
        .orderBy('due.due_at')
        .orderBy('due.id')
        .limit(1),
    )
    .returning(['id', 'office', 'recipient', 'payload', 'idempotency_key', 'attempts'])
    .executeTakeFirst();
  if (!row) return undefined;
  const { name } = await db.selectFrom('office').select('name').where('id', '=', row.office).executeTakeFirstOrThrow();
  return {
    id: row.id,
    office: row.office,
    officeName: name,
    recipient: row.recipient,
    message: JSON.parse(row.payload) as MailMessage,
    idempotencyKey: row.idempotency_key,
    attempts: row.attempts,
  };
}

/** The service has taken a letter, under a name of its own. */
export async function updateLetterSent(db: Db, id: number, messageId: string): Promise<void> {
  const set = { state: 'sent', sent_at: instant(), message_id: messageId, last_error: null } as const;
  await db.updateTable('outbox').set(set).where('id', '=', id).execute();
}

/** An attempt failed. @param again when it is due next; null = it isn't tried again by itself */
export async function updateLetterRefused(db: Db, id: number, reason: string, again: string | null): Promise<void> {
  await db
    .updateTable('outbox')
    .set({ last_error: reason, ...(again === null ? { state: 'failed' as const } : { due_at: again }) })
    .where('id', '=', id)
    .where('state', '=', 'waiting')
    .execute();
}

/** An office's letters, the newest first. */
export async function listLetters(
  db: Db,
  office: number,
  { state, limit = 200 }: { readonly state?: LetterListed['state']; readonly limit?: number } = {},
): Promise<LetterListed[]> {
  let query = db.selectFrom('outbox').selectAll().where('office', '=', office);
  if (state !== undefined) query = query.where('state', '=', state);
  const rows = await query.orderBy('id', 'desc').limit(limit).execute();
  return rows.map((row) => ({
    id: row.id,
    recipient: row.recipient,
    kind: row.kind as MailKind,
    state: row.state,
    attempts: row.attempts,
    lastError: row.last_error,
    createdAt: row.created_at,
    sentAt: row.sent_at,
  }));
}

/**
 * A failed letter is tried from the beginning again, under its old key, so that one which did arrive is not delivered twice.
 *
 * @returns false where the office has no failed letter of that id
 */
export async function updateLetterAgain(db: Db, office: number, id: number): Promise<boolean> {
  const { numUpdatedRows } = await db
    .updateTable('outbox')
    .set({ state: 'waiting', attempts: 0, due_at: instant() })
    .where('office', '=', office)
    .where('id', '=', id)
    .where('state', '=', 'failed')
    .executeTakeFirst();
  return numUpdatedRows > 0n;
}
