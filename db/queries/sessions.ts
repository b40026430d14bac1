import { randomBytes } from 'node:crypto';
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { OfficeRole } from '@/db/schema';

/** Who stands behind a session, with the role they hold now. */
export interface SessionPerson {
  readonly session: string;
  readonly person: number;
  readonly name: string;
  readonly email: string;
  readonly office: number;
  readonly officeName: string;
  readonly role: OfficeRole;
}

/** Starts a session and gives its id: 256 random bits, the only thing a token holds. */
export async function insertSession(
  db: Db,
  session: { readonly person: number; readonly office: number; readonly expiresAt: string },
): Promise<string> {
  const id = randomBytes(32).toString('base64url');
  const { person, office, expiresAt } = session;
  await db
    .insertInto('session')
    .values({ id, person, office, created_at: instant(), expires_at: expiresAt, ended_at: null })
    .execute();
  return id;
}

/** Nothing for a session that has ended or expired, or whose person has left the office. */
export async function findSession(db: Db, id: string, now: string = instant()): Promise<SessionPerson | undefined> {
  return db
    .selectFrom('session')
    .innerJoin('membership', (join) =>
      join.onRef('membership.office', '=', 'session.office').onRef('membership.person', '=', 'session.person'),
    )
    .innerJoin('person', 'person.id', 'session.person')
    .innerJoin('office', 'office.id', 'session.office')
    .select([
      'session.id as session',
      'person.id as person',
      'person.name',
      'person.email',
      'office.id as office',
      'office.name as officeName',
      'membership.role',
    ])
    .where('session.id', '=', id)
    .where('session.ended_at', 'is', null)
    .where('session.expires_at', '>', now)
    .where('membership.ended_at', 'is', null)
    .executeTakeFirst();
}

export async function endSession(db: Db, id: string): Promise<void> {
  await db.updateTable('session').set({ ended_at: instant() }).where('id', '=', id).where('ended_at', 'is', null).execute();
}
