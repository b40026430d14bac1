import 'server-only';
import { decode } from 'next-auth/jwt';

/** What tokens that were opened before name, and until when (s since 1970): opening one takes longer than a page of a table. */
const opened = new Map<string, { readonly session: string; readonly until: number }>();
const mostOpened = 1000;

/**
 * The id of the session row that a token names; whether that session still stands is for its row to say.
 *
 * @param now s since 1970
 * @returns undefined for a token that was not made here with this secret, or has expired
 */
export async function sessionNamed(
  token: string | undefined,
  secret: string,
  now: number = Date.now() / 1000,
): Promise<string | undefined> {
  if (token === undefined || token === '') return undefined;
  const key = `${secret} ${token}`;
  const known = opened.get(key);
  if (known) return known.until > now ? known.session : undefined;
  try {
    const read = await decode({ token, secret });
    const { session, exp } = read ?? {};
    if (typeof session !== 'string') return undefined;
    if (opened.size >= mostOpened) opened.clear();
    if (typeof exp === 'number') opened.set(key, { session, until: exp });
    return session;
  } catch {
    return undefined;
  }
}
