import 'server-only';
import type { NextAuthOptions } from 'next-auth';
import Credentials from 'next-auth/providers/credentials';
import { db } from '@/db/client';
import { endSession } from '@/db/queries/sessions';
import { sessionSeconds, signIn } from './sign-in';

const secure = () => process.env.NEXTAUTH_URL?.startsWith('https://') ?? false;

/** Name of the cookie that holds the token; browsers tie the second form to TLS. */
export const sessionCookie = () => `${secure() ? '__Secure-' : ''}next-auth.session-token`;

export function sessionSecret(): string {
  const secret = process.env.NEXTAUTH_SECRET;
  if (secret === undefined || secret.length < 32) throw new Error('NEXTAUTH_SECRET must be set, 32 characters or more');
  return secret;
}

/** The token holds a session row's id and nothing else: who that is, and what they may do, is read anew each time. */
export function authOptions(): NextAuthOptions {
  return {
    secret: sessionSecret(),
    session: { strategy: 'jwt', maxAge: sessionSeconds },
    pages: { signIn: '/sign-in', error: '/sign-in' },
    providers: [
      Credentials({
        credentials: { email: {}, password: {} },
        authorize: (sent, request) => signIn(sent, addressOf(request.headers)),
      }),
    ],
    callbacks: {
      jwt: ({ token, user }) => ({ session: user === undefined ? token.session : user.id }),
      session: ({ session }) => ({ expires: session.expires }),
    },
    events: {
      signOut: async ({ token }) => {
        if (typeof token.session === 'string') await endSession(db(), token.session);
      },
    },
  };
}

/** The sender's address: the last one that was added on the way (see peer-address.ts). */
function addressOf(headers: Record<string, unknown> | undefined): string {
  const forwarded = headers?.['x-forwarded-for'];
  return (typeof forwarded === 'string' ? forwarded.split(',').at(-1)?.trim() : undefined) ?? 'unknown';
}
