import 'server-only';
import { db } from '@/db/client';
import { findSession } from '@/db/queries/sessions';
import { findToken } from '@/db/queries/tokens';
import { may, type Act, type Person } from '@/lib/access/may';
import { scopeAllows, scopeWords } from '@/lib/access/token-scopes';
import { ApiError, notFound } from '@/lib/api/error';
import { sessionCookie, sessionSecret } from './auth';
import { sessionNamed } from './session-token';

/** Who a session token belongs to, by its row as it stands now; null = nobody (forged, ended, expired, no longer of the office). */
export async function personOf(token: string | undefined): Promise<Person | null> {
  const session = await sessionNamed(token, sessionSecret());
  const found = session === undefined ? undefined : await findSession(db(), session);
  if (found === undefined) return null;
  const { person: id, name, email, role, office, officeName } = found;
  return { id, name, email, role, office, officeName };
}

/** The session that a request is sent in, so that it may stay where others end. */
export const sessionOf = (request: Request): Promise<string | undefined> =>
  sessionNamed(readCookie(request.headers.get('cookie'), sessionCookie()), sessionSecret());

/** The token of a script, where a request carries one; its cookies then count for nothing. */
export function bearerOf(request: Request): string | null {
  const found = /^Bearer +(\S+)$/i.exec(request.headers.get('authorization') ?? '');
  return found?.[1] ?? null;
}

/**
 * Who sent a request, by their session or by a personal token, and that they may do what it asks.
 *
 * @throws {ApiError} not-signed-in; not-allowed; for a client not-found, since what a client may not see does not exist
 */
export async function requirePerson(request: Request, act: Act): Promise<Person> {
  const bearer = bearerOf(request);
  const asked = bearer === null ? null : await findToken(db(), bearer);
  const person =
    bearer === null ? await personOf(readCookie(request.headers.get('cookie'), sessionCookie())) : (asked?.person ?? null);
  if (person === null) {
    const ended = 'This token does not work: it was revoked, has expired, or its person may not sign in any more. Make another.';
    throw new ApiError('not-signed-in', bearer === null ? 'Sign in first.' : ended);
  }
  if (asked && !scopeAllows(asked.scope, act)) {
    throw new ApiError('not-allowed', `This token is ${scopeWords[asked.scope]}, which does not cover this.`);
  }
  if (may(person, act)) return person;
  if (person.role === 'client') throw notFound('page');
  throw new ApiError('not-allowed', `A ${person.role} may not do this. Ask the lead of ${person.officeName}.`);
}

function readCookie(header: string | null, name: string): string | undefined {
  for (const pair of header?.split(';') ?? []) {
    const [key, ...value] = pair.split('=');
    // A token is made of letters that need no escape.
    if (key?.trim() === name) return value.join('=').trim();
  }
  return undefined;
}
