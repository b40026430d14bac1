import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { SignInRow, SignInSheet } from '@/components/sign-in/sign-in-sheet';
import { Notice } from '@/components/ui/notice';
import { localPath } from '@/lib/access/local-path';
import { homeOf } from '@/lib/access/may';
import { engineVersion } from '@/lib/analysis/engine-version';
import { pagePerson } from '../_server/page-person';
import { SignInForm } from './sign-in-form';

export const metadata: Metadata = { title: 'Sign in' };

interface SignInProps {
  readonly searchParams: Promise<{ readonly next?: string | string[]; readonly changed?: string | string[] }>;
}

export default async function SignInPage({ searchParams }: SignInProps) {
  const person = await pagePerson();
  const { next, changed } = await searchParams;
  if (person !== null) redirect(localPath(next) ?? homeOf(person.role));
  return (
    <SignInSheet version={engineVersion.split(' ').at(-1) ?? engineVersion}>
      {changed !== undefined && (
        <SignInRow>
          <Notice>Your password is changed. Sign in with it.</Notice>
        </SignInRow>
      )}
      <SignInForm next={localPath(next) ?? '/'} />
    </SignInSheet>
  );
}
