import NextAuth from 'next-auth';
import { authOptions } from '@/app/_server/auth';
import { door } from '@/app/_server/door';

interface AuthContext {
  readonly params: Promise<{ nextauth: string[] }>;
}

const handle = (request: Request, context: AuthContext): Promise<Response> =>
  door(() => (NextAuth(authOptions()) as typeof handle)(request, context))(request, { params: Promise.resolve({}) });

export { handle as GET, handle as POST };
