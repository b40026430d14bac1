import { randomBytes } from 'node:crypto';
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { secretHash } from '@/lib/access/link-secret';
import type { Person } from '@/lib/access/may';
import type { TokenScope } from '@/lib/access/token-scopes';

export interface TokenListed {
  readonly id: number;
  readonly name: string;
  readonly scope: TokenScope;
  readonly createdAt: string;
  readonly expiresAt: string;
  /** To a minute. */
  readonly usedAt: string | null;
}

/** Makes a token: 256 random bits, given back this once. */
export async function insertToken(
  db: Db,
  office: number,
  of: { readonly person: number; readonly name: string; readonly scope: TokenScope; readonly expiresAt: string },
): Promise<{ readonly id: number; readonly token: string }> {
  const token = `tally_${randomBytes(32).toString('base64url')}`;
  const { person, name, scope, expiresAt: expires_at } = of;
  const row = await db
    .insertInto('token')
    .values({ office, person, name, hash: secretHash(token), scope, created_at: instant(), expires_at })
    .returning('id')
    .executeTakeFirstOrThrow();
  return { id: row.id, token };
}

/** A person's tokens that work, the newest first. */
export async function listTokens(db: Db, office: number, person: number): Promise<TokenListed[]> {
  return db
    .selectFrom('token')
    .select(['id', 'name', 'scope', 'created_at as createdAt', 'expires_at as expiresAt', 'used_at as usedAt'])
    .where('office', '=', office)
    .where('person', '=', person)
    .where('ended_at', 'is', null)
    .where('expires_at', '>', instant())
    .orderBy('id', 'desc')
    .execute();
}

/** @returns false where the person has no such token that works */
export async function endToken(db: Db, office: number, person: number, token: number): Promise<boolean> {
  const { numUpdatedRows } = await db
    .updateTable('token')
    .set({ ended_at: instant() })
    .where('office', '=', office)
    .where('person', '=', person)
    .where('id', '=', token)
    .where('ended_at', 'is', null)
    .executeTakeFirst();
  return numUpdatedRows > 0n;
}

export async function endTokens(db: Db, person: number): Promise<void> {
  await db.updateTable('token').set({ ended_at: instant() }).where('person', '=', person).where('ended_at', 'is', null).execute();
}

/** Whose a token is, with the role they hold now; undefined for one that is unknown, ended, expired, or of someone disabled. */
export async function findToken(
  db: Db,
  token: string,
  now: Date = new Date(),
): Promise<{ readonly person: Person; readonly scope: TokenScope } | undefined> {
  const row = await db
    .selectFrom('token')
    .innerJoin('membership', (join) =>
      join.onRef('membership.office', '=', 'token.office').onRef('membership.person', '=', 'token.person'),
    )
    .innerJoin('person', 'person.id', 'token.person')
    .innerJoin('office', 'office.id', 'token.office')
    .select([
      'token.id as token',
      'token.scope',
      'token.used_at',
      'person.id',
      'person.name',
      'person.email',
      'membership.role',
      'office.id as office',
      'office.name as officeName',
    ])
    .where('token.hash', '=', secretHash(token))
    .where('token.ended_at', 'is', null)
    .where('token.expires_at', '>', now.toISOString())
    .where('membership.ended_at', 'is', null)
    .executeTakeFirst();
  if (!row) return undefined;
  const { token: id, scope, used_at: usedAt, ...person } = row;
  // Once a minute is enough to say when it was last used.
  if (usedAt === null || now.getTime() - Date.parse(usedAt) > 60_000) {
    await db.updateTable('token').set({ used_at: now.toISOString() }).where('id', '=', id).execute();
  }
  return { person, scope };
}
