import 'server-only';
import { decode } from 'next-auth/jwt';
import { db } from '@/db/client';
import { findSession } from '@/db/queries/sessions';
import { may, type Act, type Person } from '@/lib/access/may';
import { ApiError, notFound } from '@/lib/api/error';
import { sessionCookie, sessionSecret } from './auth';

/** Who a session token belongs to, by its row as it stands now; null = nobody (forged, ended, expired, no longer of the office). */
export async function personOf(token: string | undefined): Promise<Person | null> {
  if (token === undefined || token === '') return null;
  let session: unknown;
  try {
    session = (await decode({ token, secret: sessionSecret() }))?.session;
  } catch {
    return null;
  }
  if (typeof session !== 'string') return null;
  const found = await findSession(db(), session);
  if (found === undefined) return null;
  const { person: id, name, email, role, office, officeName } = found;
  return { id, name, email, role, office, officeName };
}

/**
 * Who sent a request, and that they may do what it asks.
 *
 * @throws {ApiError} not-signed-in; not-allowed; for a client not-found, since what a client may not see does not exist
 */
export async function requirePerson(request: Request, act: Act): Promise<Person> {
  const person = await personOf(readCookie(request.headers.get('cookie'), sessionCookie()));
  if (person === null) throw new ApiError('not-signed-in', 'Sign in first.');
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
