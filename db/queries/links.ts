/** Links that work once: an invitation's, and one to choose a new password by. Looked up by the hash of what their holder carries. */
import { randomBytes } from 'node:crypto';
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { linkSecret, secretHash } from '@/lib/access/link-secret';

const linkLife_ms = { invitation: 7 * 86_400_000, 'password reset': 3_600_000 } as const;

type LinkOf = { readonly invitation: number } | { readonly person: number };

/** Makes a link and ends earlier ones of the same invitation or person; its row id, from which a letter's writer derives the secret. */
export async function insertLink(db: Db, office: number, of: LinkOf, serverSecret: string): Promise<number> {
  const now = new Date();
  const purpose = 'invitation' in of ? 'invitation' : 'password reset';
  await endLinks(db, of);
  const nonce = randomBytes(24).toString('base64url');
  const row = await db
    .insertInto('single_use_link')
    .values({
      purpose,
      office,
      invitation: 'invitation' in of ? of.invitation : null,
      person: 'person' in of ? of.person : null,
      nonce,
      hash: secretHash(linkSecret(serverSecret, nonce)),
      created_at: now.toISOString(),
      expires_at: new Date(now.getTime() + linkLife_ms[purpose]).toISOString(),
      ended_at: null,
    })
    .returning('id')
    .executeTakeFirstOrThrow();
  return row.id;
}

export async function endLinks(db: Db, of: LinkOf): Promise<void> {
  const query = db.updateTable('single_use_link').set({ ended_at: instant() }).where('ended_at', 'is', null);
  await ('invitation' in of ? query.where('invitation', '=', of.invitation) : query.where('person', '=', of.person)).execute();
}

/** The secret that a letter carries; undefined where the link has ended or expired, or the server's secret is another by now. */
export async function findLinkSecret(db: Db, id: number, serverSecret: string): Promise<string | undefined> {
  const row = await open(db).where('single_use_link.id', '=', id).executeTakeFirst();
  if (!row) return undefined;
  const secret = linkSecret(serverSecret, row.nonce);
  return secretHash(secret) === row.hash ? secret : undefined;
}

export interface LinkFound {
  readonly id: number;
  readonly office: number;
  readonly invitation: number | null;
  readonly person: number | null;
}

/** The link that a secret opens; undefined for one that is used, ended, expired, or never was. */
export async function findLink(db: Db, purpose: 'invitation' | 'password reset', secret: string): Promise<LinkFound | undefined> {
  return open(db).where('hash', '=', secretHash(secret)).where('purpose', '=', purpose).executeTakeFirst();
}

/** Uses a link up. @returns false where another was faster, or it has ended */
export async function useLink(db: Db, id: number): Promise<boolean> {
  const { numUpdatedRows } = await db
    .updateTable('single_use_link')
    .set({ ended_at: instant() })
    .where('id', '=', id)
    .where('ended_at', 'is', null)
    .executeTakeFirst();
  return numUpdatedRows > 0n;
}

const open = (db: Db) =>
  db
    .selectFrom('single_use_link')
    .select(['id', 'office', 'invitation', 'person', 'nonce', 'hash'])
    .where('ended_at', 'is', null)
    .where('expires_at', '>', instant());
