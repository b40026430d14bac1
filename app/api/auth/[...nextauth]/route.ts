import NextAuth from 'next-auth';
import { authOptions } from '@/app/_server/auth';
import { door, type Params } from '@/app/_server/door';

type NextAuthHandler = (request: Request, context: { params: Promise<{ nextauth: string[] }> }) => Promise<Response>;

const handle = (request: Request, { params }: Params<'nextauth'>) => {
  const handler = NextAuth(authOptions()) as NextAuthHandler;
  return handler(request, { params: params.then(({ nextauth }) => ({ nextauth: [nextauth].flat() })) });
};

export const GET = door<'nextauth'>(handle);
export const POST = door<'nextauth'>(handle);
